import { describe, expect, it } from 'vitest'
import { idByContent } from '@/api/new-id.ts'

describe('ids of what a form sends', () => {
  it('are the same for the same content, so that sending again does it once', () => {
    const ids = idByContent()
    expect(ids.of({ reason: 'Ice' })).toBe(ids.of({ reason: 'Ice' }))
  })

  it('are others for other content, which an answer that was lost must not stand in the way of', () => {
    const ids = idByContent()
    const first = ids.of({ reason: 'Ice' })
    expect(ids.of({ reason: 'Hail' })).not.toBe(first)
  })

  it('are others once it is done, though the content is the same', () => {
    const ids = idByContent()
    const first = ids.of({ reason: 'Ice' })
    ids.done()
    expect(ids.of({ reason: 'Ice' })).not.toBe(first)
  })
})
