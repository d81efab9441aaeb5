import type { Statement } from '../../group-transaction.ts'

/** The statements of the board. `$1` is the group, `$2` to `$7` are the filters of `filterValues`. */

const NAMES = `JOIN kit_kind kk ON kk.id = k.kit_kind_id
  LEFT JOIN place home ON home.id = k.home_place_id`

const FILTERS = `($2::text[] IS NULL OR b.verdict = ANY($2))
    AND ($3::text[] IS NULL OR b.availability = ANY($3))
    AND ($4::uuid[] IS NULL OR k.kit_kind_id = ANY($4))
    AND ($5::uuid[] IS NULL OR PLACE = ANY($5))
    AND ($6::boolean IS NULL OR kk.station = $6)
    AND ($7::text IS NULL OR
      concat_ws(' ', k.designation, kk.code, kk.name, home.name, place.name, REASON) ILIKE $7)`

const filters = (place: string, reasonTop: string) =>
  FILTERS.replace('PLACE', place).replace('REASON', reasonTop)

const epochMs = (column: string) => `(extract(epoch FROM ${column}) * 1000)::float8`

const KEPT_FROM = `FROM board_row b JOIN kit k ON k.id = b.kit_id ${NAMES} LEFT JOIN place ON place.id = k.place_id`

const KEPT_COLUMNS = `b.kit_id, b.designation, kk.code, kk.name AS kind, b.station, b.verdict, b.verdict_rank,
  b.availability, k.availability_reason, k.expected_return_on::text, b.reason_top, b.reason_n,
  ${epochMs('b.holds_until')} AS holds_until, home.name AS home, place.name AS place, b.band_codes,
  b.watts::float8, b.hours::float8, b.horizon`

export interface KeptBoardRow {
  kit_id: string
  designation: string
  code: string
  kind: string
  station: boolean
  verdict: string
  verdict_rank: number
  availability: string
  availability_reason: string
  expected_return_on: string | null
  reason_top: string
  reason_n: number
  holds_until: number
  home: string | null
  place: string | null
  band_codes: string
  watts: number | null
  hours: number | null
  /** JSON, ready to be sent. */
  horizon: string
}

/** `$2` to `$4`: rank, holds-until and kit after which the page begins; `$5`: rows. */
export const KEPT_PAGE: Statement = {
  name: 'board-page',
  text: `SELECT ${KEPT_COLUMNS} ${KEPT_FROM}
    WHERE b.group_id = $1 AND (b.verdict_rank, b.holds_until, b.kit_id) > ($2, $3::timestamptz, $4::uuid)
    ORDER BY b.verdict_rank, b.holds_until, b.kit_id LIMIT $5`,
}

/** The same with filters: `$8` to `$10` is where the page begins, `$11` the rows. */
export const KEPT_PAGE_FILTERED: Statement = {
  name: 'board-page-filtered',
  text: `SELECT ${KEPT_COLUMNS} ${KEPT_FROM}
    WHERE b.group_id = $1 AND ${filters('k.place_id', 'b.reason_top')}
      AND (b.verdict_rank, b.holds_until, b.kit_id) > ($8, $9::timestamptz, $10::uuid)
    ORDER BY b.verdict_rank, b.holds_until, b.kit_id LIMIT $11`,
}

export const KEPT_TOTAL: Statement = {
  name: 'board-total',
  text: `SELECT count(*)::int AS n ${KEPT_FROM} WHERE b.group_id = $1 AND ${filters('k.place_id', 'b.reason_top')}`,
}

export const KEPT_COUNTS: Statement = {
  name: 'board-counts',
  text: `SELECT station, availability, verdict, n FROM board_count WHERE group_id = $1 AND n > 0
    ORDER BY station DESC, availability, verdict`,
}

/** The revision, and whether a kept row's own end has passed at `$2`: then the periods are asked instead. */
export const REVISION: Statement = {
  name: 'board-revision',
  text: `SELECT coalesce((SELECT revision FROM board_revision WHERE group_id = $1), 0)::float8 AS revision,
    EXISTS (SELECT FROM board_row WHERE group_id = $1 AND valid_until <= $2) AS is_past`,
}

/** The oldest vital evidence under a deployable verdict. */
export const KEPT_OLDEST: Statement = {
  name: 'board-oldest',
  text: `SELECT kit_id, designation, oldest_vital_on::text AS "on" FROM board_row
    WHERE group_id = $1 AND verdict_rank <= 1 AND oldest_vital_on IS NOT NULL
    ORDER BY oldest_vital_on, designation LIMIT 1`,
}

export const KEPT_NEXT: Statement = {
  name: 'board-next-change',
  text: `SELECT kit_id, designation, ${epochMs('holds_until')} AS at, horizon FROM board_row
    WHERE group_id = $1 AND isfinite(holds_until) ORDER BY holds_until, designation LIMIT 1`,
}

const VERDICT_RANK = `array_position(ARRAY['proven', 'proven-with-limits', 'not-proven', 'not-fit'], b.verdict) - 1`
const AT_FROM = `FROM readiness_period b JOIN kit k ON k.id = b.kit_id ${NAMES}
  LEFT JOIN place ON place.id = b.place_id`

/** Stored periods that hold at `$8`, after rank `$9`, designation `$10` and kit `$11`; `$12` rows. */
export const PAGE_AT: Statement = {
  name: 'board-page-at',
  text: `SELECT * FROM (
      SELECT b.kit_id, k.designation, kk.code, kk.name AS kind, kk.station, b.verdict, ${VERDICT_RANK} AS verdict_rank,
        b.availability, b.availability_reason, k.expected_return_on::text, b.reasons, b.capability,
        home.name AS home, place.name AS place
      ${AT_FROM}
      WHERE b.group_id = $1 AND b.during @> $8::timestamptz AND ${filters('b.place_id', "b.reasons -> 0 ->> 'text'")}
    ) p
    WHERE (verdict_rank, lower(designation), kit_id) > ($9, $10::text, $11::uuid)
    ORDER BY verdict_rank, lower(designation), kit_id LIMIT $12`,
}

export const TOTAL_AT: Statement = {
  name: 'board-total-at',
  text: `SELECT count(*)::int AS n ${AT_FROM}
    WHERE b.group_id = $1 AND b.during @> $8::timestamptz AND ${filters('b.place_id', "b.reasons -> 0 ->> 'text'")}`,
}

export const COUNTS_AT: Statement = {
  name: 'board-counts-at',
  text: `SELECT kk.station, b.availability, b.verdict, count(*)::int AS n
    FROM readiness_period b JOIN kit k ON k.id = b.kit_id JOIN kit_kind kk ON kk.id = k.kit_kind_id
    WHERE b.group_id = $1 AND b.during @> $2::timestamptz
    GROUP BY kk.station, b.availability, b.verdict ORDER BY kk.station DESC, b.availability, b.verdict`,
}

export const OLDEST_AT: Statement = {
  name: 'board-oldest-at',
  text: `SELECT b.kit_id, k.designation, b.oldest_vital_on::text AS "on"
    FROM readiness_period b JOIN kit k ON k.id = b.kit_id
    WHERE b.group_id = $1 AND b.during @> $2::timestamptz AND b.verdict IN ('proven', 'proven-with-limits')
      AND b.oldest_vital_on IS NOT NULL
    ORDER BY b.oldest_vital_on, k.designation LIMIT 1`,
}

/** The kit whose verdict changes first after `$2`. */
export const NEXT_AT: Statement = {
  name: 'board-next-at',
  text: `SELECT p.kit_id, k.designation FROM (
      SELECT kit_id, lower(during) AS at, verdict,
        lag(verdict) OVER (PARTITION BY kit_id ORDER BY lower(during)) AS before
      FROM readiness_period WHERE group_id = $1 AND during && tstzrange($2::timestamptz, NULL)
    ) p JOIN kit k ON k.id = p.kit_id
    WHERE p.before <> p.verdict ORDER BY p.at, k.designation LIMIT 1`,
}
