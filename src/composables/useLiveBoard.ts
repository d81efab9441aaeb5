import { onScopeDispose, shallowReadonly, shallowRef, watch } from 'vue'
import { readBoard, type BoardAnswer } from '#shared/contracts/board.ts'
import { addressOf } from '@/api/address.ts'
import { callApi } from '@/api/call-api.ts'
import { takeEarly } from '@/api/early-answers.ts'
import { followLive } from '@/api/follow-live.ts'
import { changedKits, keepLayout, layoutOf, sameLayout, type SectionLayout } from '@/format/board-layout.ts'
import { useBoardStore } from '@/stores/board.ts'
import { useSessionStore } from '@/stores/session.ts'
import { boardQuery, type BoardFilters } from './useBoardFilters.ts'

export interface ShownBoard {
  readonly board: BoardAnswer
  readonly layout: readonly SectionLayout[]
  /** When the rows that changed on the screen did so, epoch ms by kit. */
  readonly changed: ReadonlyMap<string, number>
  /** Rows would stand elsewhere if they were sorted now. */
  readonly outOfOrder: boolean
  /** When this was read, epoch ms. */
  readonly readAtMs: number
}

export type BoardState =
  | { readonly status: 'loading' }
  | { readonly status: 'failed'; readonly error: unknown }
  | { readonly status: 'shown'; readonly shown: ShownBoard; readonly stale: unknown }

const NONE: ReadonlyMap<string, number> = new Map()

/**
 * The board for the filters given, which follows the group's changes by itself. Rows stay where they are while they
 * change; `sortAgain` and every change of a filter put them in order. A failed refresh keeps what is on the screen and
 * says in `stale` why it is not newer.
 */
export function useLiveBoard(filters: () => BoardFilters) {
  const session = useSessionStore()
  const store = useBoardStore()
  const state = shallowRef<BoardState>({ status: 'loading' })
  const connected = shallowRef(true)
  let running = new AbortController()

  const address = () => addressOf(readBoard.path, undefined, boardQuery(filters()))

  async function load(order: 'sorted' | 'kept'): Promise<void> {
    running.abort()
    const mine = (running = new AbortController())
    const at = address()
    try {
      const first = await readPage(mine.signal, undefined, takeEarly('board', at))
      // The first page is enough to be read; a refresh waits for all, so that no row goes and comes back.
      if (first.next && state.value.status !== 'shown') show(first, at, order)
      const board = await readRest(first, mine.signal)
      if (!mine.signal.aborted) show(board, at, order)
    } catch (error) {
      if (!mine.signal.aborted) fail(error)
    }
  }

  async function readPage(
    signal: AbortSignal,
    after?: string,
    early?: Promise<Response>,
  ): Promise<BoardAnswer> {
    let atMs = NaN
    const answered = (ms: number) => void (atMs = ms)
    const board = await callApi(readBoard, {
      query: { ...boardQuery(filters()), after },
      signal,
      early,
      answered,
    })
    return board.computedFor === 'now' ? { ...board, asOf: latest(board.asOf, atMs) } : board
  }

  async function readRest(first: BoardAnswer, signal: AbortSignal): Promise<BoardAnswer> {
    const rows = [...first.rows]
    for (let next = first.next; next !== null;) {
      const page = await readPage(signal, next)
      rows.push(...page.rows)
      next = page.next
    }
    return { ...first, rows, next: null }
  }

  function show(board: BoardAnswer, at: string, order: 'sorted' | 'kept'): void {
    const before = state.value.status === 'shown' && order === 'kept' ? state.value.shown : null
    const sorted = layoutOf(board.rows)
    const layout = before ? keepLayout(before.layout, board.rows) : sorted
    const changed = before ? withChanges(before, board) : NONE
    const shown = { board, layout, changed, outOfOrder: !sameLayout(layout, sorted), readAtMs: Date.now() }
    state.value = { status: 'shown', shown, stale: null }
    store.kept = { address: at, memberId: session.member?.id ?? '', board, layout }
  }

  function fail(error: unknown): void {
    state.value =
      state.value.status === 'shown' ? { ...state.value, stale: error } : { status: 'failed', error }
  }

  function sortAgain(): void {
    if (state.value.status !== 'shown') return
    const { shown } = state.value
    const layout = layoutOf(shown.board.rows)
    state.value = { ...state.value, shown: { ...shown, layout, outOfOrder: false, changed: NONE } }
  }

  restore()
  watch(address, () => void load('sorted'))
  void load('kept')
  onScopeDispose(
    followLive({
      changed: ({ revision }) => {
        const known = state.value.status === 'shown' ? state.value.shown.board : null
        if (known && known.computedFor !== 'past' && revision > known.revision) void load('kept')
      },
      connected: (again) => {
        connected.value = true
        if (again) void load('kept')
      },
      disconnected: () => void (connected.value = false),
    }),
  )
  onScopeDispose(() => running.abort())

  function restore(): void {
    const { kept } = store
    if (!kept || kept.address !== address() || kept.memberId !== session.member?.id) return
    const { board, layout } = kept
    state.value = {
      status: 'shown',
      shown: { board, layout, changed: NONE, outOfOrder: false, readAtMs: Date.now() },
      stale: null,
    }
  }

  return { state: shallowReadonly(state), connected: shallowReadonly(connected), load, sortAgain }
}

function withChanges(before: ShownBoard, board: BoardAnswer): ReadonlyMap<string, number> {
  const atMs = Date.now()
  const fresh = changedKits(before.board.rows, board.rows).map((kitId) => [kitId, atMs] as const)
  return new Map([...before.changed, ...fresh])
}

/** A board that has not changed comes out of the browser's cache: it holds as of this answer, not as of the first. */
function latest(asOf: string, answeredAtMs: number): string {
  return answeredAtMs > Date.parse(asOf) ? new Date(answeredAtMs).toISOString() : asOf
}
