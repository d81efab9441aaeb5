import { describe, expect, it } from 'vitest'
import { boardQuery, readFilters, writeFilters } from '@/composables/useBoardFilters.ts'

describe('the filters of the board in the address', () => {
  const query = {
    asOf: '2026-01-14T20:00:00.000Z',
    verdict: 'not-fit,proven',
    availability: 'assigned',
    kind: 'k',
    place: 'p',
    station: 'true',
    search: 'K-0',
    need: '40m,60W',
  }

  it('come back as they were written', () => {
    const filters = readFilters(query)
    expect(filters.verdict).toEqual(['proven', 'not-fit'])
    expect(readFilters(writeFilters(filters) as typeof query)).toEqual(filters)
  })

  it('leave out what is not set', () => {
    expect(writeFilters(readFilters({}))).toEqual({})
  })

  it('drop what nobody could have chosen', () => {
    const filters = readFilters({ asOf: 'soon', verdict: 'great,not-fit', availability: ['assigned', 'x'] })
    expect(filters).toMatchObject({ asOf: null, verdict: ['not-fit'], availability: ['assigned'] })
    expect(readFilters({ search: 'x'.repeat(100) }).search).toHaveLength(80)
  })

  it('ask for the largest page in the words of the endpoint', () => {
    expect(boardQuery(readFilters({ station: 'true', need: '40m' }))).toEqual({ station: 'true', size: 200 })
  })
})
