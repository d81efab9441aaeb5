import { describe, expect, it } from 'vitest'
import { heardTag } from '#shared/engine/heard-tag.ts'
import { spokenTag } from '#shared/engine/tag-speech.ts'
import { TAG_CHARACTERS } from '#shared/engine/tag.ts'

describe('a tag as it was heard', () => {
  it.each([
    ['Kilo Tango Four Zulu Seven Six', 'KT4Z76'],
    ['kt 4z-76', 'KT4Z76'],
    ['KT4Z76', 'KT4Z76'],
    ['X-ray Foxtrot three Mike niner Papa Mike', 'XF3M9PM'],
    ['x ray foxtrot, tree mike nine papa mike', 'XF3M9PM'],
    ['Kilo Tango 4 Z seven 6', 'KT4Z76'],
    ['alpha november whisky', 'ANW'],
  ])('reads %j as %s', (typed, tag) => {
    expect(heardTag(typed)).toBe(tag)
  })

  it('reads back every character as it is spoken', () => {
    expect(heardTag(spokenTag(TAG_CHARACTERS))).toBe(TAG_CHARACTERS)
  })

  it('leaves a designation as it was typed, without spaces and hyphens', () => {
    expect(heardTag('xfm-10')).toBe('XFM10')
  })
})
