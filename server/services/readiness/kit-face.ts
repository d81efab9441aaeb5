import type { KitReadiness } from '#shared/contracts/kit-readiness.ts'
import { notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'

interface FaceRow {
  [column: string]: unknown
  id: string
  designation: string
  tag: string
  kind_id: string
  code: string
  kind: string
  station: boolean
  promise: KitReadiness['promise']
  availability: KitReadiness['availability']
  availability_reason: string
  expected_return_on: string | null
  home_id: string | null
  home: string | null
  place_id: string | null
  place: string | null
}

const FACE: Statement = {
  name: 'kit-face',
  text: `SELECT k.id, k.designation, k.tag, kk.id AS kind_id, kk.code, kk.name AS kind, kk.station, kk.promise,
      k.availability, k.availability_reason, k.expected_return_on::text, home.id AS home_id, home.name AS home,
      place.id AS place_id, place.name AS place
    FROM kit k JOIN kit_kind kk ON kk.id = k.kit_kind_id
    LEFT JOIN place home ON home.id = k.home_place_id LEFT JOIN place ON place.id = k.place_id
    WHERE k.group_id = $1 AND k.id = $2`,
}

export type KitFace = Pick<
  KitReadiness,
  | 'kitId'
  | 'designation'
  | 'tag'
  | 'kind'
  | 'promise'
  | 'availability'
  | 'availabilityReason'
  | 'expectedReturnOn'
  | 'homePlace'
  | 'place'
>

/** What a kit is, where it is and whether it may go: today. 404 when it is not in the group. */
export async function readKitFace(tx: GroupTx, kitId: string): Promise<KitFace> {
  const [row] = await tx.sql<FaceRow>(FACE, [tx.groupId, kitId])
  if (!row) throw notFound('kit')
  return {
    kitId: row.id,
    designation: row.designation,
    tag: row.tag,
    kind: { id: row.kind_id, name: row.kind, code: row.code, station: row.station },
    promise: row.promise,
    availability: row.availability,
    availabilityReason: row.availability_reason,
    expectedReturnOn: row.expected_return_on,
    homePlace: namedOf(row.home_id, row.home),
    place: namedOf(row.place_id, row.place),
  }
}

const namedOf = (id: string | null, name: string | null) =>
  id === null || name === null ? null : { id, name }
