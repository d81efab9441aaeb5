import { setImmediate as breathe } from 'node:timers/promises'
import { rankFixes } from '#shared/engine/advice/rank-fixes.ts'
import type { AdviceKit, Plan } from '#shared/engine/advice/work.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import type { AppContext } from '../../context.ts'
import { inGroup, type GroupTx, type Statement } from '../../group-transaction.ts'
import { loadKitStates } from '../load-kit-states.ts'
import { loadSpares } from '../readiness/spare-states.ts'
import type { By } from '../registry/thing.ts'
import { WorkGate } from '../work-gate.ts'
import { digestOf } from './what-if-question.ts'

/** Stations looked at in one answer. */
const MOST_KITS = 40

/** The search takes its time on a core that serves everybody: one at a time. */
const gate = new WorkGate({
  atOnce: 1,
  longestQueue: 8,
  longestWaitMs: 2000,
  busy: 'The advice is being worked out for others just now. Try again in a moment.',
})

// As the stored periods say it: those at home and on the shelf before those on issue, then by designation.
const WANTING: Statement = {
  name: 'advice-stations',
  text: `SELECT k.id, k.expected_return_on::text AS due, count(*) OVER ()::int AS n
    FROM kit k JOIN kit_kind kk ON kk.id = k.kit_kind_id
    JOIN readiness_period p ON p.kit_id = k.id AND p.during @> $2::timestamptz
    WHERE k.group_id = $1 AND k.retired_at IS NULL AND kk.station
      AND (p.verdict <> 'proven' OR (k.availability = 'assigned' AND k.expected_return_on < $3::date))
    ORDER BY k.availability = 'assigned', k.designation LIMIT $4`,
}

export interface AdvicePlans {
  readonly plans: readonly Plan[]
  readonly at: Date
  /** Stations that want something, and of them how many were not looked at. */
  readonly wanting: number
  readonly leftOut: number
  /** Where each kit is that was looked at; null: with a holder, or nobody knows. */
  readonly placeOf: ReadonlyMap<string, string | null>
}

/** Searches under way, by what they rest on: who asks the same meanwhile waits for the same answer. */
const running = new Map<string, Promise<readonly Plan[]>>()

/** What to do across the group. What it rests on is read in one transaction; the search runs after it. */
export async function advicePlans(ctx: AppContext, by: By): Promise<AdvicePlans> {
  const { kits, spares, today, ...rest } = await inGroup(ctx, by, load)
  const states = digestOf([...kits.map(({ state }) => state), ...spares])
  const key = [by.groupId, today, states, ...kits.map((kit) => kit.expectedReturnOn)].join(' ')
  const day = { at: rest.at.getTime(), today, breathe: () => breathe() }
  const search = running.get(key) ?? gate.run(() => rankFixes(kits, spares, day))
  running.set(key, search)
  return { ...rest, plans: await search.finally(() => running.delete(key)) }
}

interface Loaded extends Omit<AdvicePlans, 'plans'> {
  readonly kits: readonly AdviceKit[]
  readonly spares: readonly KitState[]
  readonly today: string
}

async function load(tx: GroupTx): Promise<Loaded> {
  const today = await tx.today()
  const [rows, spares] = await Promise.all([
    tx.sql<{ id: string; due: string | null; n: number }>(WANTING, [tx.groupId, tx.now, today, MOST_KITS]),
    loadSpares(tx),
  ])
  const dueOf = new Map(rows.map(({ id, due }) => [id, due]))
  const loaded = await loadKitStates(
    tx,
    rows.map(({ id }) => id),
  )
  const kits = loaded
    .map(({ state }) => ({ state, expectedReturnOn: dueOf.get(state.kit.id) ?? null }))
    .sort((a, b) => a.state.kit.designation.localeCompare(b.state.kit.designation))
  const wanting = rows[0]?.n ?? 0
  return {
    kits,
    spares: spares.map(({ state }) => state),
    wanting,
    leftOut: wanting - kits.length,
    placeOf: new Map(loaded.map(({ state, placeId }) => [state.kit.id, placeId])),
    at: tx.now,
    today,
  }
}
