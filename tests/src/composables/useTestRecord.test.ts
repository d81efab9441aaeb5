import { describe, expect, it } from 'vitest'
import { instantOf, localInput } from '@/composables/useTestRecord.ts'

describe('the moment of a test', () => {
  it('is the instant that the form shows', () => {
    expect(instantOf('2026-03-04T05:06')).toBe(new Date('2026-03-04T05:06').toISOString())
  })

  it('comes back as it was put in', () => {
    expect(localInput(new Date(instantOf('2026-03-04T05:06')))).toBe('2026-03-04T05:06')
  })

  it('goes out as typed where it is none, so that the service can name the field', () => {
    expect(instantOf('')).toBe('')
  })
})
