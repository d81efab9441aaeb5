import type { z } from 'zod'
import type { kitRow } from '#shared/contracts/kits.ts'
import type { Availability, Verdict } from '#shared/engine/vocabulary.ts'
import { instant, namedOf, RECORD_COLUMNS, recordFieldsOf, type RecordColumns } from './values.ts'

type Answer = Omit<z.input<typeof kitRow>, 'items' | 'itemsPlanned'>

/** Statements with these columns need `$2`: now. A board row past its own end is passed over for the stored period. */
export const KIT_VERDICT = `CASE WHEN b.valid_until > $2 THEN b.verdict ELSE (
    SELECT p.verdict FROM readiness_period p WHERE p.kit_id = t.id AND p.during @> $2::timestamptz) END`

export const KIT_HOLDS_UNTIL = `CASE WHEN b.valid_until > $2 AND b.holds_until < 'infinity' THEN b.holds_until END`

export const KIT_COLUMNS = `t.id, t.tag, t.designation, t.availability, t.availability_reason,
  t.expected_return_on::text, t.kit_kind_id, kk.code AS kind_code, kk.name AS kind_name, kk.station,
  t.home_place_id, hp.name AS home_place_name, t.place_id, p.name AS place_name,
  t.holder_id, m.name AS holder_name, t.responsible_id, rm.name AS responsible_name, ${RECORD_COLUMNS}, ${KIT_VERDICT} AS verdict,
  ${KIT_HOLDS_UNTIL} AS holds_until`

export const KIT_TABLES = `kit t JOIN kit_kind kk ON kk.id = t.kit_kind_id
  LEFT JOIN place hp ON hp.id = t.home_place_id LEFT JOIN place p ON p.id = t.place_id
  LEFT JOIN member m ON m.id = t.holder_id LEFT JOIN member rm ON rm.id = t.responsible_id LEFT JOIN board_row b ON b.kit_id = t.id`

export interface KitColumns extends RecordColumns {
  id: string
  tag: string
  designation: string
  availability: Availability
  availability_reason: string
  expected_return_on: string | null
  kit_kind_id: string
  kind_code: string
  kind_name: string
  station: boolean
  home_place_id: string | null
  home_place_name: string | null
  place_id: string | null
  place_name: string | null
  holder_id: string | null
  holder_name: string | null
  responsible_id: string | null
  responsible_name: string | null
  verdict: Verdict | null
  holds_until: Date | null
}

export function kitFieldsOf(row: KitColumns): Answer {
  return {
    id: row.id,
    tag: row.tag,
    designation: row.designation,
    kind: { id: row.kit_kind_id, code: row.kind_code, name: row.kind_name, station: row.station },
    homePlace: namedOf(row.home_place_id, row.home_place_name),
    place: namedOf(row.place_id, row.place_name),
    availability: row.availability,
    availabilityReason: row.availability_reason,
    expectedReturnOn: row.expected_return_on,
    holder: namedOf(row.holder_id, row.holder_name),
    responsible: namedOf(row.responsible_id, row.responsible_name),
    verdict: row.verdict,
    holdsUntil: instant(row.holds_until),
    ...recordFieldsOf(row),
  }
}
