import { computed } from 'vue'
import { useRoute, useRouter, type LocationQuery, type LocationQueryRaw } from 'vue-router'
import type { QueryInputOf } from '#shared/contracts/endpoint.ts'
import type { readBoard } from '#shared/contracts/board.ts'
import { AVAILABILITIES, VERDICTS, type Availability, type Verdict } from '#shared/engine/vocabulary.ts'

/** What narrows the board, kept in the address under the names of the contract. */
export interface BoardFilters {
  readonly asOf: string | null
  readonly verdict: readonly Verdict[]
  readonly availability: readonly Availability[]
  readonly kind: string | null
  readonly place: string | null
  readonly stationsOnly: boolean
  readonly search: string
  /** What is needed, see `format/need.ts`; it ranks the rows and narrows none. Null: nobody asked. */
  readonly need: string | null
}

const NO_FILTERS: BoardFilters = {
  asOf: null,
  verdict: [],
  availability: [],
  kind: null,
  place: null,
  stationsOnly: false,
  search: '',
  need: null,
}

/** Reads and writes the filters of the board in the address, so that a view of it can be sent to somebody. */
export function useBoardFilters() {
  const route = useRoute()
  const router = useRouter()
  const filters = computed(() => readFilters(route.query))
  const count = computed(() => countFilters(filters.value))

  function change(part: Partial<BoardFilters>): void {
    void router.replace({ query: writeFilters({ ...filters.value, ...part }) })
  }

  /** Keeps the date and the need: they are no filters. */
  const clear = () => change({ ...NO_FILTERS, asOf: filters.value.asOf, need: filters.value.need })

  return { filters, count, change, clear }
}

export function readFilters(query: LocationQuery): BoardFilters {
  const asOf = one(query.asOf)
  return {
    asOf: asOf !== '' && !Number.isNaN(Date.parse(asOf)) ? asOf : null,
    verdict: several(query.verdict, VERDICTS),
    availability: several(query.availability, AVAILABILITIES),
    kind: one(query.kind) || null,
    place: one(query.place) || null,
    stationsOnly: one(query.station) === 'true',
    search: one(query.search).slice(0, 80),
    need: one(query.need) || null,
  }
}

export function writeFilters(filters: BoardFilters): LocationQueryRaw {
  const { asOf, verdict, availability, kind, place, stationsOnly, search, need } = filters
  return {
    ...(asOf && { asOf }),
    ...(verdict.length > 0 && { verdict: verdict.join(',') }),
    ...(availability.length > 0 && { availability: availability.join(',') }),
    ...(kind && { kind }),
    ...(place && { place }),
    ...(stationsOnly && { station: 'true' }),
    ...(search && { search }),
    ...(need && { need }),
  }
}

/** The filters as the endpoint takes them; `writeFilters` uses its names already. The need is another endpoint's. */
export function boardQuery(filters: BoardFilters): QueryInputOf<typeof readBoard> {
  return { ...writeFilters({ ...filters, need: null }), size: 200 } as QueryInputOf<typeof readBoard>
}

function countFilters({ verdict, availability, kind, place, stationsOnly, search }: BoardFilters): number {
  return [verdict.length > 0, availability.length > 0, kind, place, stationsOnly, search].filter(Boolean)
    .length
}

function one(value: LocationQuery[string] | undefined): string {
  const first = Array.isArray(value) ? value[0] : value
  return first ?? ''
}

function several<Word extends string>(
  value: LocationQuery[string] | undefined,
  words: readonly Word[],
): Word[] {
  const asked = one(value).split(',')
  return words.filter((word) => asked.includes(word))
}
