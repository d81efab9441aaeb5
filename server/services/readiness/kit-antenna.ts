import type { KitExposureRecord } from '#shared/contracts/kit-exposure.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'

const ANTENNA: Statement = {
  name: 'exposure-antenna',
  text: `SELECT i.id, i.designation, i.details -> 'lengthM' AS length_m, i.details -> 'feedOhms' AS feed_ohm
    FROM item i JOIN position p ON p.id = i.position_id
    WHERE i.kit_id = $1 AND i.category = 'antenna' AND i.retired_at IS NULL ORDER BY p.ordinal, i.designation LIMIT 1`,
}

interface AntennaRow {
  [column: string]: unknown
  id: string
  designation: string
  length_m: number | null
  feed_ohm: number | null
}

/** The antenna that a kit's exposure is about, with what its page says. */
export async function kitAntenna(tx: GroupTx, kitId: string): Promise<KitExposureRecord['antenna']> {
  const [row] = await tx.sql<AntennaRow>(ANTENNA, [kitId])
  if (!row) return null
  const { id, designation, length_m: lengthM, feed_ohm: feedOhm } = row
  return { id, designation, lengthM, feedOhm }
}
