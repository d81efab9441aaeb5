import { kitTimeline } from '#shared/engine/readiness/timeline.ts'
import type { Period } from '#shared/engine/readiness/period-types.ts'
import type { GroupTx } from '../group-transaction.ts'
import { boardRowOf, keptRows, writeBoard, type KeptRow } from './board-rows.ts'
import { policiesOrFirst } from './first-policy.ts'
import { loadKitStates, type LoadedKit } from './load-kit-states.ts'
import { lockKits } from './lock-kits.ts'
import { changeOf, periodsFrom, writePeriods, type PeriodChange, type StoredPeriod } from './period-rows.ts'

/** What a rewriting did to one kit: the period that held before, if any, and the one that holds now. */
export interface KitChange {
  readonly kitId: string
  readonly designation: string
  readonly before: StoredPeriod | null
  readonly after: Period
}

/** Kits whose states are in memory at once. */
const STEP = 200

/**
 * Rewrites the stored periods of these kits from `tx.now` on, in the transaction of the change that caused it, and
 * with them the board. What was stored about the past stays as it was known then. A retired kit's record ends and it
 * leaves the board. Call it last: whatever the verdict depends on must already be written.
 */
export async function rewriteReadiness(tx: GroupTx, kitIds: readonly string[]): Promise<void> {
  const ids = [...new Set(kitIds)].sort()
  for (let at = 0; at < ids.length; at += STEP) {
    const rewriting = await prepareRewriting(tx, ids.slice(at, at + STEP))
    await rewriting.write()
  }
}

/** A rewriting that is computed and not yet written. */
export interface KitRewriting {
  /** What it does to each kit that is in use. */
  readonly changes: readonly KitChange[]
  write(): Promise<void>
}

/**
 * The two halves of the same, for a caller that has more to send: the first reads and computes, `write` writes. All
 * statements of the first are sent before it is awaited, so they see what was sent before them.
 */
export async function prepareRewriting(tx: GroupTx, kitIds: readonly string[]): Promise<KitRewriting> {
  if (kitIds.length === 0) return { changes: [], write: async () => undefined }
  const [, kits, stored, kept] = await Promise.all([
    lockKits(tx, kitIds),
    loadKitStates(tx, kitIds, policiesOrFirst),
    periodsFrom(tx, kitIds, tx.now),
    keptRows(tx, kitIds),
  ])
  const keptOf = new Map(kept.map((row) => [row.kitId, row]))
  const results = kits.map((kit) => {
    const id = kit.state.kit.id
    return rewriteOne(tx.now.getTime(), { kit, stored: stored.get(id) ?? [], kept: keptOf.get(id) })
  })
  return { changes: results.flatMap(changeTo), write: () => writeResults(tx, results) }
}

function changeTo({ kit, before, future: [after] }: Rewriting): KitChange[] {
  const { id: kitId, designation } = kit.state.kit
  return after ? [{ kitId, designation, before, after }] : []
}

interface OneKit {
  readonly kit: LoadedKit
  readonly stored: readonly StoredPeriod[]
  readonly kept: KeptRow | undefined
}

interface Rewriting extends OneKit {
  readonly future: readonly Period[]
  readonly change: PeriodChange | null
  readonly before: StoredPeriod | null
  /** The kept row shows something else, or its end has passed. */
  readonly rowIsStale: boolean
}

function rewriteOne(now: number, one: OneKit): Rewriting {
  const { kit, stored, kept } = one
  const { state, face, placeId, retired } = kit
  const future = retired ? [] : kitTimeline(state, now)
  const { availabilityReason } = state.kit
  const toStore = future.map((period) => ({ ...period, availabilityReason, placeId }))
  const isStale = kept?.face !== face || kept.validUntil <= now
  return {
    ...one,
    future,
    change: changeOf({ kitId: state.kit.id, stored, future: toStore, now }),
    before: stored.find((period) => period.from <= now) ?? null,
    rowIsStale: retired ? kept !== undefined : isStale,
  }
}

async function writeResults(tx: GroupTx, results: readonly Rewriting[]): Promise<void> {
  const changed = results.filter(({ change, rowIsStale }) => change !== null || rowIsStale)
  if (changed.length === 0) return
  const rows = changed.flatMap(({ kit, future: [first, ...rest] }) => {
    const { id: kitId, designation } = kit.state.kit
    return first
      ? [boardRowOf({ kitId, designation, station: kit.station, face: kit.face }, [first, ...rest])]
      : []
  })
  const removed = changed.filter(({ kit }) => kit.retired).map(({ kit }) => kit.state.kit.id)
  const before = changed.flatMap(({ kept }) => (kept ? [kept] : []))
  await Promise.all([
    writePeriods(
      tx,
      changed.flatMap(({ change }) => (change ? [change] : [])),
    ),
    writeBoard(tx, { rows, removed, before }),
  ])
}
