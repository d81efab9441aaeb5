import { describe, expect, it } from 'vitest'
import { ProblemError } from '@/api/problem-error.ts'
import { useProblem } from '@/composables/useProblem.ts'

const invalid = (pointer: string) =>
  new ProblemError({ code: 'request-invalid', fields: new Map([[pointer, 'Look again.']]) })

describe('the problem of a form', () => {
  it('keeps what the work throws and finds the message of a field', async () => {
    const { error, problem, field, run } = useProblem()
    const result = await run(() => Promise.reject(invalid('#/details/ratedAh')))
    expect(result).toBeUndefined()
    expect(problem.value?.code).toBe('request-invalid')
    expect(field('details', 'ratedAh')).toBe('Look again.')
    expect(field('name')).toBeUndefined()
    expect(error.value).toBe(problem.value)
  })

  it('is gone when the next work goes well', async () => {
    const { error, run } = useProblem()
    await run(() => Promise.reject(new Error('x')))
    expect(await run(async () => 7)).toBe(7)
    expect(error.value).toBeNull()
  })

  it('escapes names as JSON pointers do', async () => {
    const { field, run } = useProblem()
    await run(() => Promise.reject(invalid('#/a~1b/c~0d/0')))
    expect(field('a/b', 'c~d', 0)).toBe('Look again.')
  })
})
