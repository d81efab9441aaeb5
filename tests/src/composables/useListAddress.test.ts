import { describe, expect, it } from 'vitest'
import { listItems } from '#shared/contracts/items.ts'
import { readValues } from '@/composables/useListAddress.ts'

const read = (query: Record<string, string | string[]>) => readValues(listItems.query.shape, query)

describe('a list as its address says', () => {
  it('takes the names of its contract', () => {
    const query = { page: '3', sort: 'tag', descending: 'true', search: 'xfm', category: 'transformer' }
    expect(read(query)).toEqual(query)
  })

  it('leaves out what the contract refuses, what it does not know and what is empty', () => {
    expect(read({ page: '0', sort: 'colour', category: 'piano', of: 'items', search: '' })).toEqual({})
  })

  it('takes the first of a name that is given twice, and never the number of rows', () => {
    expect(read({ search: ['one', 'two'], size: '200' })).toEqual({ search: 'one' })
  })
})
