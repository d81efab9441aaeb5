import type { Reason } from '#shared/engine/readiness/period-types.ts'
import type { NeedKit } from '#shared/engine/readiness/need.ts'
import type { Statement } from '../../group-transaction.ts'

/** What a kit was able to do at an instant, and why no more. */
export interface NeedRow extends Record<string, unknown> {
  kit_id: string
  designation: string
  station: boolean
  verdict: NeedKit['verdict']
  availability: NeedKit['availability']
  capability: NeedKit['capability']
  promised_modes: NeedKit['promisedModes'] | null
  place_id: string | null
  place: string | null
  /** Name of the place asked for. */
  asked_place: string | null
  reasons: readonly Reason[]
}

/** The periods of group `$1` that hold at `$2`; `$3` is the place asked for, or null. Nothing narrows them: far and near are told by the engine. */
export const NEED_AT: Statement = {
  name: 'board-need-at',
  text: `SELECT b.kit_id, k.designation, kk.station, b.verdict, b.availability, b.capability,
      kk.promise -> 'modes' AS promised_modes, b.place_id, place.name AS place,
      (SELECT name FROM place WHERE id = $3::uuid AND group_id = $1) AS asked_place, b.reasons
    FROM readiness_period b JOIN kit k ON k.id = b.kit_id JOIN kit_kind kk ON kk.id = k.kit_kind_id
      LEFT JOIN place ON place.id = b.place_id
    WHERE b.group_id = $1 AND b.during @> $2::timestamptz
    ORDER BY kk.station DESC, lower(k.designation), b.kit_id`,
}
