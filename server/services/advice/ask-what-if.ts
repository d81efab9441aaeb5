import type { BoardCount } from '#shared/contracts/board.ts'
import type { BodyOf, ResponseOf } from '#shared/contracts/endpoint.ts'
import type { askWhatIf as contract } from '#shared/contracts/advice.ts'
import { whatIf, type WhatIfKit } from '#shared/engine/advice/what-if.ts'
import type { WhatIfStep } from '#shared/engine/advice/steps.ts'
import { isFailure, type Failure } from '#shared/engine/outcome.ts'
import { holdsUntil } from '#shared/engine/readiness/horizon.ts'
import type { Period } from '#shared/engine/readiness/types.ts'
import { invalidField } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { COUNTS_AT } from '../board/board-statements.ts'
import { loadKitStates } from '../load-kit-states.ts'
import { loadSpares } from '../readiness/spare-states.ts'

type Answer = ResponseOf<typeof contract>
type Standing = Answer['kits'][number]['before']

/** Kits that are named ($2), that hold an item named, or that were tested with an instrument named. */
const CONCERNED: Statement = {
  name: 'what-if-kits',
  text: `SELECT id FROM kit WHERE group_id = $1 AND retired_at IS NULL AND (id = ANY($2::uuid[])
      OR id IN (SELECT kit_id FROM item WHERE group_id = $1 AND id = ANY($2::uuid[]))
      OR id IN (SELECT coalesce(t.kit_id, i.kit_id) FROM test t LEFT JOIN item i ON i.id = t.item_id
        WHERE t.group_id = $1 AND t.instrument_id = ANY($2::uuid[])))
    ORDER BY designation`,
}

/** The same judgement as when it is done, on the same states, and nothing is written. */
export async function askWhatIf(tx: GroupTx, { steps }: BodyOf<typeof contract>): Promise<Answer> {
  const [rows, spares, before] = await Promise.all([
    tx.sql<{ id: string }>(CONCERNED, [tx.groupId, idsIn(steps)]),
    loadSpares(tx),
    tx.sql<BoardCount & Record<string, unknown>>(COUNTS_AT, [tx.groupId, tx.now]),
  ])
  const loaded = await loadKitStates(
    tx,
    rows.map(({ id }) => id),
  )
  const stations = new Map(loaded.map(({ state, station }) => [state.kit.id, station]))
  const kits = whatIf(
    loaded.map(({ state }) => state),
    spares.map(({ state }) => state),
    steps,
    tx.now.getTime(),
  )
  if (isFailure(kits)) throw invalidStep(kits)
  const changed = kits.map((kit) => ({ kit, station: stations.get(kit.before.kit.id) ?? false }))
  return {
    at: tx.now.toISOString(),
    kits: kits.map(kitOf).sort((a, b) => a.designation.localeCompare(b.designation)),
    before,
    after: changed.reduce(recounted, [...before]),
  }
}

const ID = /[0-9a-f]{8}-[0-9a-f-]{27}/g

function idsIn(steps: readonly WhatIfStep[]): string[] {
  return [...new Set(JSON.stringify(steps).match(ID) ?? [])]
}

function invalidStep({ field = 'steps', message }: Failure) {
  return invalidField(`#/${field.replace(/\[(\d+)\]/, '/$1')}`, message)
}

function kitOf({ before, was, becomes }: WhatIfKit): Answer['kits'][number] {
  const { id: kitId, designation } = before.kit
  return { kitId, designation, before: standingOf(was), after: standingOf(becomes) }
}

function standingOf(periods: readonly Period[]): Standing {
  const { verdict, availability, reasons } = periods[0]!
  const until = holdsUntil(periods)
  return {
    verdict,
    availability,
    reasons: [...reasons],
    holdsUntil: until === null ? null : new Date(until).toISOString(),
  }
}

interface Recounted {
  readonly kit: WhatIfKit
  readonly station: boolean
}

function recounted(counts: BoardCount[], { kit: { was, becomes }, station }: Recounted): BoardCount[] {
  return added(added(counts, { station, period: was[0]!, by: -1 }), { station, period: becomes[0]!, by: 1 })
}

interface Cell {
  readonly station: boolean
  readonly period: Period
  readonly by: number
}

function added(counts: readonly BoardCount[], { station, period, by }: Cell): BoardCount[] {
  const { verdict, availability } = period
  const isSame = (one: BoardCount) =>
    one.station === station && one.verdict === verdict && one.availability === availability
  const n = (counts.find(isSame)?.n ?? 0) + by
  const others = counts.filter((one) => !isSame(one))
  return n > 0 ? [...others, { station, verdict, availability, n }] : others
}
