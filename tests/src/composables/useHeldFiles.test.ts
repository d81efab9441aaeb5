import { effectScope } from 'vue'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { useHeldFiles } from '@/composables/useHeldFiles.ts'
import { askEngine } from '@/measure/ask-engine.ts'
import { makeAnswerer } from '@/measure/answering.ts'

// The worker is a thing of the browser; its answers are the engine's own.
vi.mock('@/measure/ask-engine.ts', () => ({ askEngine: vi.fn() }))

const TOUCHSTONE = '# Hz S RI R 50\n7000000 0.1 0\n7200000 0.2 0\n'
const fileOf = (text: string) => new File([text], 'sweep.s1p')
const asked = () =>
  vi.mocked(askEngine).mock.calls.map(([name, ask]) => [name, (ask as { id: string }).id] as const)

describe('the files of a form', () => {
  beforeEach(() => {
    const answerer = makeAnswerer() as Record<string, (ask: unknown) => unknown>
    vi.mocked(askEngine).mockReset()
    vi.mocked(askEngine).mockImplementation(((name: string, ask: unknown) =>
      Promise.resolve(answerer[name]!(ask))) as typeof askEngine)
  })

  it('are read as soon as they are chosen', async () => {
    const held = effectScope().run(() => useHeldFiles('touchstone', 1))!
    await held.add([fileOf(TOUCHSTONE)])
    expect(held.list.value).toMatchObject([{ state: 'read', facts: { ports: 1, points: 2 } }])
  })

  it('leave the worker when they are taken out, those that were refused too', async () => {
    const held = effectScope().run(() => useHeldFiles('touchstone', 1))!
    await held.add([fileOf('no sweep at all')])
    const [refused] = held.list.value
    expect(refused).toMatchObject({ state: 'refused' })
    held.remove(refused!.id)
    expect(held.list.value).toEqual([])
    expect(asked().at(-1)).toEqual(['forget-file', refused!.id])
  })

  it('leave the worker with the form', async () => {
    const scope = effectScope()
    const held = scope.run(() => useHeldFiles('touchstone', 1))!
    await held.add([fileOf(TOUCHSTONE)])
    const [file] = held.list.value
    scope.stop()
    expect(asked().at(-1)).toEqual(['forget-file', file!.id])
  })
})
