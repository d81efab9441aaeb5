import { describe, expect, it, vi } from 'vitest'
import { useThermometerLog } from '@/composables/useThermometerLog.ts'
import { askEngine } from '@/measure/ask-engine.ts'
import { readThermometerLog } from '@/measure/thermometer-log.ts'

// The worker is a thing of the browser; its answers are the reader's own.
vi.mock('@/measure/ask-engine.ts', () => ({ askEngine: vi.fn() }))

const LOG = 'Time s,Temp °C\n0,22\n60,31'

describe('a thermometer’s log on its way in', () => {
  it('is there once it was read', async () => {
    vi.mocked(askEngine).mockResolvedValueOnce(readThermometerLog(LOG))
    const { log, read } = useThermometerLog()
    await read(LOG)
    expect(log.value?.readings).toHaveLength(2)
  })

  it('says so when the device does not hand the file over', async () => {
    const gone = { arrayBuffer: () => Promise.reject(new Error('gone')) } as unknown as Blob
    const { log, failure, readFile } = useThermometerLog()
    await readFile(gone)
    expect(log.value).toBeNull()
    expect(failure.value?.message).toContain('choose it again')
  })

  it('does not come back when its answer is late and it was taken over meanwhile', async () => {
    vi.mocked(askEngine).mockResolvedValueOnce(readThermometerLog(LOG))
    const { log, failure, read, forget } = useThermometerLog()
    const reading = read(LOG)
    forget()
    await reading
    expect(log.value).toBeNull()
    expect(failure.value).toBeNull()
  })
})
