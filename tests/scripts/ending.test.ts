import { describe, expect, it, vi } from 'vitest'
import { Ending } from '../../scripts/lib/ending.ts'

describe('Ending', () => {
  it('stops what was started last first, and once', async () => {
    const stopped: string[] = []
    const ending = new Ending()
    await ending.add(() => Promise.resolve(stopped.push('database')))
    await ending.add(() => Promise.resolve(stopped.push('server')))
    await Promise.all([ending.run(), ending.run()])
    expect(stopped).toEqual(['server', 'database'])
  })

  it('stops at once what was started when the end had begun', async () => {
    const stop = vi.fn(() => Promise.resolve())
    const ending = new Ending()
    await ending.run()
    await ending.add(stop)
    expect(stop).toHaveBeenCalledOnce()
  })

  it('stops the others when one does not stop', async () => {
    const complain = vi.spyOn(console, 'error').mockReturnValue()
    const stop = vi.fn(() => Promise.resolve())
    const ending = new Ending()
    await ending.add(stop)
    await ending.add(() => Promise.reject(new Error('The server is stuck.')))
    await ending.run()
    expect(stop).toHaveBeenCalledOnce()
    expect(complain).toHaveBeenCalledWith('The server is stuck.')
    complain.mockRestore()
  })
})
