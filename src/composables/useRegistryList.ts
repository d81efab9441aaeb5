import { computed, reactive, watch } from 'vue'
import { useQuery } from '@pinia/colada'
import type { z } from 'zod'
import type { Endpoint, QueryInputOf, ResponseOf } from '#shared/contracts/endpoint.ts'
import { callApi, type Call } from '@/api/call-api.ts'
import { useListAddress, type ListValues } from './useListAddress.ts'

/** Rows of one page; performance C3 holds the grid to this. */
export const PAGE_ROWS = 25

/** What one print of tags takes, and what choosing all brings at most. */
export const MOST_ROWS = 1000
const STEP_ROWS = 200

type ListEndpoint = Endpoint & {
  readonly query: z.ZodObject<z.ZodRawShape>
  readonly response: z.ZodType<{ rows: unknown[]; total: number }>
}

export type RowOf<E> = ResponseOf<E> extends { rows: (infer Row)[] } ? Row : never

/** One page of a list and the ways to change what it shows. */
export interface RegistryList<Row> {
  /** The contract's name; also the name under which the device remembers columns. */
  readonly name: string
  readonly status: 'loading' | 'failed' | 'shown'
  readonly rows: readonly Row[]
  readonly total: number
  readonly page: number
  readonly sort: string
  readonly descending: boolean
  readonly search: string
  readonly values: ListValues
  /** Search or filters leave something out. */
  readonly narrowed: boolean
  /** Another page or a newer one is on its way. */
  readonly busy: boolean
  /** Why the rows are not there, or not newer. */
  readonly error: unknown
  change(part: ListValues, typing?: boolean): void
  sortBy(sort: string, descending: boolean): void
  turnTo(page: number): void
  clear(): void
  reload(): void
  /** Every row that fits the search and the filters, `MOST_ROWS` at most. */
  readAll(): Promise<Row[]>
}

const NOT_FILTERS = new Set(['page', 'sort', 'descending'])

/** A registry list as its address says, 25 rows a page; the page before stays on the screen until the next is there. */
export function useRegistryList<E extends ListEndpoint>(
  endpoint: E,
  firstSort: string,
): RegistryList<RowOf<E>> {
  const { values, change } = useListAddress(endpoint.query.shape)
  const { data, error, asyncStatus, refetch } = useQuery({
    key: () => [endpoint.name, { ...values.value }],
    query: ({ signal }) => callApi(endpoint, callOf<E>(values.value, signal)),
    placeholderData: (previous) => previous,
    refetchOnMount: 'always',
  })
  const answer = computed(() => data.value as { rows: RowOf<E>[]; total: number } | undefined)
  const total = computed(() => answer.value?.total ?? 0)
  const page = computed(() => Number(values.value.page ?? 1))

  // The last rows of the last page may have gone since the address was written.
  watch([answer, page], () => {
    const last = Math.max(1, Math.ceil(total.value / PAGE_ROWS))
    if (answer.value && asyncStatus.value === 'idle' && page.value > last) turnTo(last, true)
  })

  const narrow = (part: ListValues, typing = false) => change({ ...part, page: '' }, typing)
  const turnTo = (wanted: number, replace = false) =>
    change({ page: wanted === 1 ? '' : String(wanted) }, replace)
  async function readAll(): Promise<RowOf<E>[]> {
    const rows: unknown[] = []
    for (let step = 1; (step - 1) * STEP_ROWS < Math.min(total.value, MOST_ROWS); step += 1) {
      const query = { ...values.value, page: step, size: STEP_ROWS } as QueryInputOf<E>
      const answer = (await callApi(endpoint, { query } as Call<E>)) as { rows: unknown[] }
      rows.push(...answer.rows)
    }
    return rows as RowOf<E>[]
  }
  const clear = () => {
    const filters = Object.keys(values.value).filter((name) => !NOT_FILTERS.has(name))
    narrow(Object.fromEntries(filters.map((name) => [name, ''])))
  }

  return reactive({
    name: endpoint.name,
    status: computed(() => (answer.value ? 'shown' : error.value ? 'failed' : 'loading')),
    rows: computed(() => answer.value?.rows ?? []),
    total,
    page,
    sort: computed(() => values.value.sort ?? firstSort),
    descending: computed(() => values.value.descending === 'true'),
    search: computed(() => values.value.search ?? ''),
    values,
    narrowed: computed(() => Object.keys(values.value).some((name) => !NOT_FILTERS.has(name))),
    busy: computed(() => asyncStatus.value === 'loading'),
    error,
    change: narrow,
    sortBy: (sort: string, descending: boolean) =>
      narrow({ sort: sort === firstSort ? '' : sort, descending: descending ? 'true' : '' }),
    turnTo: (wanted: number) => turnTo(wanted),
    clear,
    reload: () => void refetch(),
    readAll,
  }) as RegistryList<RowOf<E>>
}

function callOf<E extends ListEndpoint>(values: ListValues, signal: AbortSignal): Call<E> {
  return { query: { ...values, size: PAGE_ROWS } as QueryInputOf<E>, signal } as Call<E>
}
