import { describe, expect, it } from 'vitest'
import { spokenTag, spokenWords } from '#shared/engine/tag-speech.ts'
import { TAG_CHARACTERS } from '#shared/engine/tag.ts'

describe('spokenTag', () => {
  it('reads a tag with the spelling alphabet', () => {
    expect(spokenTag('KT4Z76')).toBe('Kilo Tango Four Zulu Seven Six')
    expect(spokenTag('xf-39j')).toBe('X-ray Foxtrot Three Niner Juliett')
  })

  it('has a word of its own for every character of the alphabet', () => {
    expect(new Set(spokenWords(TAG_CHARACTERS)).size).toBe(31)
  })

  it('speaks nothing for other characters', () => expect(spokenTag('* é')).toBe(''))
})
