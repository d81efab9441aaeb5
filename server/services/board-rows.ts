import { packBands } from '#shared/engine/readiness/band-codes.ts'
import { horizonOf } from '#shared/engine/readiness/horizon.ts'
import type { Period } from '#shared/engine/readiness/period-types.ts'
import { VERDICTS, type Availability, type Verdict } from '#shared/engine/vocabulary.ts'
import type { GroupTx, Statement } from '../group-transaction.ts'

/** What a board row takes from the kit itself. */
export interface BoardKit {
  readonly kitId: string
  readonly designation: string
  readonly station: boolean
  /** Changes with whatever else the board shows of the kit: kind, places, day of return. */
  readonly face: string
}

/** A row of the kept board: the period that holds now, and what comes after it in short. */
export interface BoardRowColumns extends BoardKit {
  readonly verdict: Verdict
  readonly availability: Availability
  readonly reasonTop: string
  readonly reasonCount: number
  /** Epoch ms; null: without end. */
  readonly holdsUntil: number | null
  readonly validUntil: number | null
  readonly bandCodes: string
  readonly watts: number | null
  readonly hours: number | null
  /** JSON text of `HorizonStep[]` as answers carry it, so that reading costs no parsing. */
  readonly horizon: string
  readonly oldestVitalOn: string | null
}

/** The horizon bar shows this many steps at most. */
const HORIZON_STEPS = 24

/** The board row of a kit from its periods, of which the first holds now. */
export function boardRowOf(kit: BoardKit, periods: readonly [Period, ...Period[]]): BoardRowColumns {
  const [current] = periods
  const steps = horizonOf(periods)
  const standing = current.capability.bands.filter(({ state }) => state !== 'out' && state !== 'not-proven')
  const watts = standing.flatMap((band) => (band.watts === null ? [] : [band.watts]))
  return {
    kitId: kit.kitId,
    designation: kit.designation,
    station: kit.station,
    face: kit.face,
    verdict: current.verdict,
    availability: current.availability,
    reasonTop: current.reasons[0]?.text ?? '',
    reasonCount: current.reasons.length,
    holdsUntil: steps[0]?.until ?? null,
    validUntil: current.to,
    bandCodes: packBands(current.capability.bands),
    watts: watts.length > 0 ? Math.max(...watts) : null,
    hours: current.capability.hours,
    horizon: JSON.stringify(steps.slice(0, HORIZON_STEPS).map(answeredStep)),
    oldestVitalOn: current.oldestVitalOn,
  }
}

const answeredStep = ({ until, verdict, cause }: ReturnType<typeof horizonOf>[number]) => ({
  until: until === null ? null : new Date(until).toISOString(),
  verdict,
  cause,
})

/** A kept row as it is before a change: what it counts as, and what decides whether it is still true. */
export interface KeptRow extends BoardKit {
  readonly availability: Availability
  readonly verdict: Verdict
  /** Epoch ms; Infinity: without end. */
  readonly validUntil: number
}

const KEPT: Statement = {
  name: 'kept-board-rows',
  text: `SELECT kit_id AS "kitId", designation, station, face, availability, verdict,
      (extract(epoch FROM valid_until) * 1000)::float8 AS "validUntil"
    FROM board_row WHERE kit_id = ANY($1::uuid[])`,
}
const UPSERT: Statement = {
  name: 'upsert-board-rows',
  text: `INSERT INTO board_row (kit_id, group_id, designation, station, face, verdict, verdict_rank, availability, reason_top,
      reason_n, holds_until, valid_until, band_codes, watts, hours, horizon, oldest_vital_on)
    SELECT r.kit, $2, r.designation, r.station, r.face, r.verdict, r.rank, r.availability, r.reason, r.reasons,
      coalesce(r.holds, 'infinity'), coalesce(r.valid, 'infinity'), r.bands, r.watts, r.hours, r.horizon, r.oldest
    FROM jsonb_to_recordset($1::jsonb) AS r (kit uuid, designation text, station boolean, face text, verdict text, rank smallint,
      availability text, reason text, reasons int, holds timestamptz, valid timestamptz, bands text, watts numeric,
      hours numeric, horizon text, oldest date)
    ON CONFLICT (kit_id) DO UPDATE SET designation = excluded.designation, station = excluded.station,
      face = excluded.face, verdict = excluded.verdict, verdict_rank = excluded.verdict_rank, availability = excluded.availability,
      reason_top = excluded.reason_top, reason_n = excluded.reason_n, holds_until = excluded.holds_until,
      valid_until = excluded.valid_until, band_codes = excluded.band_codes, watts = excluded.watts,
      hours = excluded.hours, horizon = excluded.horizon, oldest_vital_on = excluded.oldest_vital_on`,
}
const REMOVE: Statement = {
  name: 'remove-board-rows',
  text: 'DELETE FROM board_row WHERE kit_id = ANY($1::uuid[])',
}
// In one order always, so that two writers wait for each other and never in a circle.
const COUNT: Statement = {
  name: 'add-board-counts',
  text: `INSERT INTO board_count AS c (group_id, station, availability, verdict, n)
    SELECT $2, d.station, d.availability, d.verdict, d.n
    FROM jsonb_to_recordset($1::jsonb) AS d (station boolean, availability text, verdict text, n int)
    ORDER BY d.station, d.availability, d.verdict
    ON CONFLICT (group_id, station, availability, verdict) DO UPDATE SET n = c.n + excluded.n`,
}
// Never below the clock: after a backup was restored no number comes again that a browser holds another board under.
// One statement for both, so that the number need not come back before it is told.
const REVISE: Statement = {
  name: 'raise-board-revision',
  text: `WITH next AS (
      INSERT INTO board_revision AS r (group_id, revision) VALUES ($1, $3::bigint)
      ON CONFLICT (group_id) DO UPDATE SET revision = greatest(r.revision + 1, excluded.revision)
      RETURNING revision)
    SELECT pg_notify('halyard_board',
      json_build_object('groupId', $1::uuid, 'revision', revision, 'kitIds', $2::json)::text) FROM next`,
}

/** These kits' rows of the kept board. The kits must be locked. */
export function keptRows(tx: GroupTx, kitIds: readonly string[]): Promise<KeptRow[]> {
  return tx.sql<KeptRow & Record<string, unknown>>(KEPT, [[...kitIds]])
}

interface BoardChange {
  readonly rows: readonly BoardRowColumns[]
  /** Kits that leave the board. */
  readonly removed: readonly string[]
  /** The rows of all of these kits before. */
  readonly before: readonly KeptRow[]
}

/** Writes rows and counts, and last of all the revision, which every writer of the group must pass one by one. */
export async function writeBoard(tx: GroupTx, { rows, removed, before }: BoardChange): Promise<void> {
  const differences = countDifferences(before, rows)
  await Promise.all([
    rows.length > 0 && tx.sql(UPSERT, [JSON.stringify(rows.map(insertable)), tx.groupId]),
    removed.length > 0 && tx.sql(REMOVE, [removed]),
    differences.length > 0 && tx.sql(COUNT, [JSON.stringify(differences), tx.groupId]),
    raiseRevision(tx, [...rows.map((row) => row.kitId), ...removed]),
  ])
}

/** NOTIFY carries 8,000 bytes at most; above this many kits it names none, which means any of them. */
const NAMED_KITS = 100

/**
 * Tells every screen of the group that the board has changed, at the commit. Also for what the board shows and
 * readiness does not depend on: the name of a place or a kind.
 */
export async function raiseRevision(tx: GroupTx, kitIds: readonly string[]): Promise<void> {
  const named = kitIds.length <= NAMED_KITS ? kitIds : []
  await tx.sql(REVISE, [tx.groupId, JSON.stringify(named), tx.now.getTime()])
}

type Counted = Pick<KeptRow, 'station' | 'availability' | 'verdict'>

function countDifferences(before: readonly Counted[], after: readonly Counted[]) {
  const sums = new Map<string, number>()
  const add = ({ station, availability, verdict }: Counted, n: number) => {
    const key = JSON.stringify({ station, availability, verdict })
    sums.set(key, (sums.get(key) ?? 0) + n)
  }
  for (const row of before) add(row, -1)
  for (const row of after) add(row, 1)
  return [...sums].filter(([, n]) => n !== 0).map(([key, n]) => ({ ...(JSON.parse(key) as object), n }))
}

function insertable(row: BoardRowColumns) {
  return {
    kit: row.kitId,
    designation: row.designation,
    station: row.station,
    face: row.face,
    verdict: row.verdict,
    rank: VERDICTS.indexOf(row.verdict),
    availability: row.availability,
    reason: row.reasonTop,
    reasons: row.reasonCount,
    holds: row.holdsUntil === null ? null : new Date(row.holdsUntil),
    valid: row.validUntil === null ? null : new Date(row.validUntil),
    bands: row.bandCodes,
    watts: row.watts,
    hours: row.hours,
    horizon: row.horizon,
    oldest: row.oldestVitalOn,
  }
}
