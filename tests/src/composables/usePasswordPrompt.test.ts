import { describe, expect, it } from 'vitest'
import { usePasswordPrompt } from '@/composables/usePasswordPrompt.ts'

describe('the password prompt', () => {
  it('gives every call that waits the same answer', async () => {
    const { ask, finish, pending } = usePasswordPrompt()
    const both = Promise.all([ask(), ask()])
    expect(pending.value).not.toBeNull()
    finish(true)
    expect(await both).toEqual([true, true])
    expect(pending.value).toBeNull()
  })

  it('asks anew after it was given up', async () => {
    const { ask, finish } = usePasswordPrompt()
    const first = ask()
    finish(false)
    expect(await first).toBe(false)
    const second = ask()
    finish(true)
    expect(await second).toBe(true)
  })
})
