import { describe, expect, it } from 'vitest'
import { counted, listText } from '#shared/engine/plain-words.ts'

describe('a list of words', () => {
  it('has its last one joined by and', () => {
    expect(['', '40 m', '40 m and 20 m', '40 m, 20 m and 10 m']).toEqual([
      listText([]),
      listText(['40 m']),
      listText(['40 m', '20 m']),
      listText(['40 m', '20 m', '10 m']),
    ])
  })
})

describe('a count', () => {
  it('has its noun in the number that it asks for', () => {
    expect([counted(1, 'kit'), counted(0, 'kit'), counted(2, 'battery', 'batteries')]).toEqual([
      '1 kit',
      '0 kits',
      '2 batteries',
    ])
  })
})
