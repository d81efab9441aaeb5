/** Hashing one at a time (promise P17). */
import { setTimeout as pause } from 'node:timers/promises'
import { describe, expect, it } from 'vitest'
import { WorkGate } from '#server/services/work-gate.ts'

const limits = { atOnce: 2, longestQueue: 3, longestWaitMs: 50, busy: 'Busy.' }

/** Work that ends when told to. */
function held() {
  let end = () => {}
  const ended = new Promise<void>((resolve) => (end = resolve))
  return { work: () => ended, end: () => end() }
}

describe('WorkGate', () => {
  it('lets no more than its number run at once', async () => {
    const gate = new WorkGate({ ...limits, longestQueue: 20, longestWaitMs: 5000 })
    let running = 0
    let most = 0
    const work = async () => {
      running += 1
      most = Math.max(most, running)
      await pause(2)
      running -= 1
    }
    await Promise.all(Array.from({ length: 12 }, () => gate.run(work)))
    expect(most).toBe(2)
  })

  it('refuses at once what finds the queue full', async () => {
    const gate = new WorkGate({ ...limits, longestWaitMs: 5000 })
    const { work, end } = held()
    const accepted = Array.from({ length: 5 }, () => gate.run(work))
    await expect(gate.run(work)).rejects.toMatchObject({
      code: 'unavailable',
      extras: { retryAfterSeconds: 3 },
    })
    end()
    await Promise.all(accepted)
  })

  it('refuses what has waited too long, and goes on', async () => {
    const gate = new WorkGate(limits)
    const { work, end } = held()
    const first = [gate.run(work), gate.run(work)]
    await expect(gate.run(work)).rejects.toMatchObject({ code: 'unavailable' })
    end()
    await Promise.all(first)
    await expect(gate.run(async () => 'served')).resolves.toBe('served')
  })

  it('gives its place on when the work fails', async () => {
    const gate = new WorkGate({ ...limits, atOnce: 1 })
    await expect(gate.run(async () => Promise.reject(new Error('failed')))).rejects.toThrow('failed')
    await expect(gate.run(async () => 'served')).resolves.toBe('served')
  })
})
