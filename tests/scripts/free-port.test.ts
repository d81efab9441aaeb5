import { connect } from 'node:net'
import { describe, expect, it } from 'vitest'
import { holdFirstFree, holdPort, isPortTaken } from '../../scripts/lib/free-port.ts'

describe('holdFirstFree', () => {
  it('passes over a port that somebody else holds', async () => {
    const taken = await holdPort(0)
    const free = await holdPort(0)
    await free.release()
    const held = await holdFirstFree([taken.port, free.port])
    expect(held.port).toBe(free.port)
    await Promise.all([taken.release(), held.release()])
  })

  it('takes any port when all wanted ones are taken', async () => {
    const taken = await holdPort(0)
    const held = await holdFirstFree([taken.port])
    expect(held.port).not.toBe(taken.port)
    await Promise.all([taken.release(), held.release()])
  })

  it('keeps others off the port until it is released', async () => {
    const held = await holdPort(0)
    await expect(holdPort(held.port)).rejects.toSatisfy(isPortTaken)
    await held.release()
    const again = await holdPort(held.port)
    await again.release()
  })

  it('is released though a browser asked there meanwhile, which is turned away', async () => {
    const held = await holdPort(0)
    const early = connect(held.port, '127.0.0.1').on('error', () => undefined)
    await new Promise((resolve) => early.once('close', resolve))
    await held.release()
  })
})
