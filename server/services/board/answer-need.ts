import type { z } from 'zod'
import type { answerNeed, NeedAnswer } from '#shared/contracts/board-need.ts'
import { shortfallsOf, type Need, type NeedKit, type Shortfall } from '#shared/engine/readiness/need.ts'
import { causesOf, nearnessOf } from '#shared/engine/readiness/need-nearness.ts'
import { missingText, needSentence } from '#shared/engine/readiness/need-words.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { REVISION } from './board-statements.ts'
import { evidenceOf } from './need-evidence.ts'
import { NEED_AT, type NeedRow } from './need-statement.ts'

export type NeedQuery = z.output<typeof answerNeed.query>

interface Judged {
  readonly row: NeedRow
  readonly shortfalls: readonly Shortfall[]
  /** Null: not near. */
  readonly nearness: number | null
}

/** Judges every kit of the group by its stored period of that instant. */
export async function needAnswerAt(
  tx: GroupTx,
  query: NeedQuery,
  { at, computedFor }: { at: Date; computedFor: NeedAnswer['computedFor'] },
): Promise<NeedAnswer> {
  const [rows, [state]] = await Promise.all([
    tx.sql<NeedRow>(NEED_AT, [tx.groupId, at, query.at ?? null]),
    tx.sql<{ revision: number }>(REVISION, [tx.groupId, at]),
  ])
  const need = needOf(query)
  const judged = rows.map((row) => judge(row, need))
  const can = judged.filter(({ shortfalls }) => shortfalls.length === 0)
  const near = nearestFirst(judged).map((one) => nearKit(one, need, computedFor))
  const stations = can.filter(({ row }) => row.station).length
  return {
    ...needSentence({ stations, others: can.length - stations, near, tense: computedFor }),
    can: can.map(({ row }) => row.kit_id),
    near,
    others: rows.length - can.length - near.length,
    revision: state?.revision ?? 0,
    asOf: at.toISOString(),
    computedFor,
  }
}

function needOf({ bands, mode, watts, hours, mains, at }: NeedQuery): Need {
  return {
    bands: bands ?? [],
    mode: mode ?? null,
    watts: watts ?? null,
    hours: hours ?? null,
    mains,
    placeId: at ?? null,
  }
}

function judge(row: NeedRow, need: Need): Judged {
  const { verdict, availability, capability, promised_modes: promisedModes, place_id: placeId } = row
  const kit: NeedKit = { verdict, availability, capability, promisedModes: promisedModes ?? [], placeId }
  const shortfalls = shortfallsOf(kit, need)
  return { row, shortfalls, nearness: nearnessOf(shortfalls) }
}

/** Rows come with stations first and by name, which holds where the distance is the same. */
function nearestFirst(judged: readonly Judged[]): Judged[] {
  const distance = ({ row, nearness }: Judged) => (row.station ? 0 : 100) + (nearness ?? 0)
  return judged
    .filter(({ nearness }) => nearness !== null)
    .sort((one, other) => distance(one) - distance(other))
}

function nearKit({ row, shortfalls }: Judged, need: Need, tense: NeedAnswer['computedFor']) {
  const reasonTop = row.reasons[0]?.text ?? ''
  const places = { asked: row.asked_place, has: row.place }
  const [cause] = causesOf(shortfalls)
  return {
    kitId: row.kit_id,
    designation: row.designation,
    missing: missingText({ shortfalls, need, reasonTop, places, tense }),
    testId: cause ? evidenceOf(cause, row) : null,
  }
}
