import { createHash } from 'node:crypto'
import { v7 as uuidv7 } from 'uuid'
import { groupBy } from '#shared/engine/group-by.ts'
import type { Period } from '#shared/engine/readiness/period-types.ts'
import type { GroupTx, Statement } from '../group-transaction.ts'

/** A kit's period as stored. `from` and `to` are epoch ms like in the engine. */
export interface StoredPeriod extends Period {
  readonly id: string
  readonly kitId: string
  readonly availabilityReason: string
  readonly placeId: string | null
  readonly digest: string
  readonly knownSince: Date
}

/** A period that is to be stored, with what the kit itself says at the time. */
export interface PeriodToStore extends Period {
  readonly availabilityReason: string
  readonly placeId: string | null
}

interface PeriodRow {
  id: string
  kit_id: string
  from_at: Date
  to_at: Date | null
  verdict: Period['verdict']
  availability: Period['availability']
  availability_reason: string
  place_id: string | null
  reasons: Period['reasons']
  capability: Period['capability']
  oldest_vital_on: string | null
  digest: string
  known_since: Date
}

const COLUMNS = `id, kit_id, lower(during) AS from_at, upper(during) AS to_at, verdict, availability,
  availability_reason, place_id, reasons, capability, oldest_vital_on::text, digest, known_since`

const PERIODS_FROM: Statement = {
  name: 'periods-from',
  text: `SELECT ${COLUMNS} FROM readiness_period
    WHERE kit_id = ANY($1::uuid[]) AND during && tstzrange($2, NULL) ORDER BY kit_id, lower(during)`,
}
const TRUNCATE: Statement = {
  name: 'end-periods',
  text: `UPDATE readiness_period SET during = tstzrange(lower(during), ends.at)
    FROM unnest($1::uuid[], $2::timestamptz[]) AS ends (id, at) WHERE readiness_period.id = ends.id`,
}
const DELETE: Statement = {
  name: 'delete-periods',
  text: 'DELETE FROM readiness_period WHERE id = ANY($1::uuid[])',
}
const INSERT: Statement = {
  name: 'insert-periods',
  text: `INSERT INTO readiness_period (id, group_id, kit_id, during, verdict, availability, availability_reason,
      place_id, reasons, capability, oldest_vital_on, digest, known_since)
    SELECT p.id, $2, p.kit, tstzrange(p.from_at, p.to_at), p.verdict, p.availability, p.availability_reason,
      p.place, p.reasons, p.capability, p.oldest, p.digest, $3
    FROM jsonb_to_recordset($1::jsonb) AS p (id uuid, kit uuid, from_at timestamptz, to_at timestamptz, verdict text,
      availability text, availability_reason text, place uuid, reasons jsonb, capability jsonb, oldest date,
      digest text)`,
}

/** The stored periods of these kits that end after `from`, oldest first, by kit. */
export async function periodsFrom(
  tx: GroupTx,
  kitIds: readonly string[],
  from: Date,
): Promise<Map<string, StoredPeriod[]>> {
  const rows = await tx.sql<PeriodRow>(PERIODS_FROM, [[...kitIds], from])
  return groupBy(rows.map(periodOf), (period) => period.kitId)
}

function periodOf(row: PeriodRow): StoredPeriod {
  return {
    id: row.id,
    kitId: row.kit_id,
    from: row.from_at.getTime(),
    to: row.to_at?.getTime() ?? null,
    verdict: row.verdict,
    availability: row.availability,
    availabilityReason: row.availability_reason,
    placeId: row.place_id,
    reasons: row.reasons,
    capability: row.capability,
    oldestVitalOn: row.oldest_vital_on,
    digest: row.digest,
    knownSince: row.known_since,
  }
}

/** What must change so that the stored periods of a kit say `future` from `now` on and the same as before until then. */
export interface PeriodChange {
  readonly kitId: string
  /** Stored periods that end earlier or later than they did. */
  readonly ends: readonly { readonly id: string; readonly at: number | null }[]
  readonly deleted: readonly string[]
  readonly inserted: readonly (PeriodToStore & { digest: string })[]
}

interface ComparedPeriods {
  readonly kitId: string
  /** All that end after `now`, oldest first. */
  readonly stored: readonly StoredPeriod[]
  readonly future: readonly PeriodToStore[]
  /** Epoch ms. */
  readonly now: number
}

/**
 * Compares what is stored with what is computed. `future` begins at `now`; an empty one ends the kit's record.
 * Null when nothing changes. A stored period that contains `now` and says the same goes on instead of being cut.
 */
export function changeOf({ kitId, stored, future, now }: ComparedPeriods): PeriodChange | null {
  const next = future.map((period) => ({ ...period, digest: digestOf(period) }))
  const [first, ...rest] = next
  const current = stored.find((period) => period.from < now)
  const goesOn = current !== undefined && first !== undefined && current.digest === first.digest
  const later = stored.filter((period) => period !== current)
  const inserted = goesOn ? rest : next
  const currentEnd = goesOn ? first.to : now
  const endsAlike = current === undefined || current.to === currentEnd
  if (endsAlike && sameSequence(later, inserted)) return null
  return {
    kitId,
    ends: endsAlike ? [] : [{ id: current.id, at: currentEnd }],
    deleted: later.map((period) => period.id),
    inserted,
  }
}

function sameSequence(
  stored: readonly StoredPeriod[],
  next: readonly { from: number; to: number | null; digest: string }[],
): boolean {
  return (
    stored.length === next.length &&
    stored.every((period, index) => {
      const other = next[index]
      return other?.from === period.from && other.to === period.to && other.digest === period.digest
    })
  )
}

/** Everything a period says but its bounds. */
function digestOf(period: PeriodToStore): string {
  const { verdict, availability, availabilityReason, placeId, reasons, capability, oldestVitalOn } = period
  const content = [verdict, availability, availabilityReason, placeId, reasons, capability, oldestVitalOn]
  return createHash('sha256').update(JSON.stringify(content)).digest('base64url').slice(0, 22)
}

/** Writes the changes of many kits in three statements; the exclusion constraint holds at each. */
export async function writePeriods(tx: GroupTx, changes: readonly PeriodChange[]): Promise<void> {
  const deleted = changes.flatMap((change) => change.deleted)
  const ends = changes.flatMap((change) => change.ends)
  const inserted = changes.flatMap(({ kitId, inserted: periods }) =>
    periods.map((period) => insertable(kitId, period)),
  )
  await Promise.all([
    deleted.length > 0 && tx.sql(DELETE, [deleted]),
    ends.length > 0 && tx.sql(TRUNCATE, [ends.map((end) => end.id), ends.map((end) => dateOf(end.at))]),
    inserted.length > 0 && tx.sql(INSERT, [JSON.stringify(inserted), tx.groupId, tx.now]),
  ])
}

function insertable(kitId: string, period: PeriodToStore & { digest: string }) {
  return {
    id: uuidv7(),
    kit: kitId,
    from_at: dateOf(period.from),
    to_at: dateOf(period.to),
    verdict: period.verdict,
    availability: period.availability,
    availability_reason: period.availabilityReason,
    place: period.placeId,
    reasons: period.reasons,
    capability: period.capability,
    oldest: period.oldestVitalOn,
    digest: period.digest,
  }
}

const dateOf = (at: number | null) => (at === null ? null : new Date(at))
