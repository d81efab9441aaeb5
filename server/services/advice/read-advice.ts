import { setImmediate as breathe } from 'node:timers/promises'
import type { ResponseOf } from '#shared/contracts/endpoint.ts'
import type { readAdvice as contract } from '#shared/contracts/advice.ts'
import { rankFixes } from '#shared/engine/advice/rank-fixes.ts'
import type { AdviceKit, Plan } from '#shared/engine/advice/work.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import type { AppContext } from '../../context.ts'
import { inGroup, type GroupTx, type Statement } from '../../group-transaction.ts'
import { loadKitStates } from '../load-kit-states.ts'
import { loadSpares } from '../readiness/spare-states.ts'
import type { By } from '../registry/thing.ts'
import { WorkGate } from '../work-gate.ts'

type Answer = ResponseOf<typeof contract>

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

interface Loaded {
  readonly kits: readonly AdviceKit[]
  readonly spares: readonly KitState[]
  readonly wanting: number
  readonly at: Date
  readonly today: string
}

/** What to do across the group. What it rests on is read in one transaction; the search runs after it. */
export async function readAdvice(ctx: AppContext, by: By): Promise<Answer> {
  const { kits, spares, wanting, at, today } = await inGroup(ctx, by, load)
  const day = { at: at.getTime(), today, breathe: () => breathe() }
  const plans = await gate.run(() => rankFixes(kits, spares, day))
  return { at: at.toISOString(), plans: plans.map(shown), wanting, leftOut: wanting - kits.length }
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
  return { kits, spares: spares.map(({ state }) => state), wanting: rows[0]?.n ?? 0, at: tx.now, today }
}

function shown({
  works,
  minutes,
  changes,
  countAfter,
  deployable,
  proven,
  returned,
}: Plan): Answer['plans'][number] {
  return {
    minutes,
    works: works.map(({ text, minutes: each, steps }) => ({ text, minutes: each, steps: [...steps] })),
    changes: [...changes],
    countAfter: [...countAfter],
    deployable,
    proven,
    returned,
  }
}
