import type { BoardCount } from '#shared/contracts/board.ts'
import type { BodyOf, ResponseOf } from '#shared/contracts/endpoint.ts'
import type { askWhatIf as contract } from '#shared/contracts/what-if.ts'
import { doable } from '#shared/engine/advice/doable-steps.ts'
import { whatIf, type WhatIfKit } from '#shared/engine/advice/what-if.ts'
import type { WhatIfStep } from '#shared/engine/advice/steps.ts'
import { horizonOf } from '#shared/engine/readiness/horizon.ts'
import type { Period } from '#shared/engine/readiness/period-types.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { COUNTS_AT } from '../board/board-statements.ts'
import { fitting, readQuestion, type Question } from './what-if-question.ts'

type Answer = ResponseOf<typeof contract>
type Standing = Answer['kits'][number]['before']

/** The same judgement as when it is done, on the same states, and nothing is written. */
export async function askWhatIf(tx: GroupTx, { steps }: BodyOf<typeof contract>): Promise<Answer> {
  const [question, before] = await Promise.all([
    readQuestion(tx, steps),
    tx.sql<BoardCount & Record<string, unknown>>(COUNTS_AT, [tx.groupId, tx.now]),
  ])
  const all = judged(tx, question, question.steps)
  const atOnce = judged(tx, question, doable(question.told))
  const stations = new Map(question.loaded.map(({ state, station }) => [state.kit.id, station]))
  const counted = (kits: readonly WhatIfKit[]) =>
    kits
      .map((kit) => ({ kit, station: stations.get(kit.before.kit.id) ?? false }))
      .reduce(recounted, [...before])
  const soon = new Map(atOnce.map(({ before: { kit }, becomes }) => [kit.id, becomes]))
  return {
    at: tx.now.toISOString(),
    steps: question.told.map(({ text, waits }) => ({ text, waits })),
    kits: all
      .map((kit) => kitOf(kit, soon.get(kit.before.kit.id) ?? kit.was))
      .sort((a, b) => a.designation.localeCompare(b.designation)),
    before,
    atOnce: counted(atOnce),
    after: counted(all),
    basis: question.basis,
  }
}

function judged(tx: GroupTx, { loaded, spares }: Question, steps: readonly WhatIfStep[]): WhatIfKit[] {
  const states = loaded.map(({ state }) => state)
  return fitting(whatIf(states, spares, steps, tx.now.getTime()))
}

function kitOf({ before, was, becomes }: WhatIfKit, atOnce: readonly Period[]): Answer['kits'][number] {
  const { id: kitId, designation } = before.kit
  return {
    kitId,
    designation,
    before: standingOf(was),
    atOnce: standingOf(atOnce),
    after: standingOf(becomes),
  }
}

function standingOf(periods: readonly Period[]): Standing {
  const { verdict, availability, reasons } = periods[0]!
  const [now, next] = horizonOf(periods)
  const until = now?.until ?? null
  return {
    verdict,
    availability,
    reasons: [...reasons],
    holdsUntil: until === null ? null : new Date(until).toISOString(),
    then: next?.verdict ?? null,
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
