import type { z } from 'zod'
import type { exposureUse, KitExposureRecord } from '#shared/contracts/kit-exposure.ts'
import { EXPOSURE_CAUTION } from '#shared/engine/exposure.ts'
import { kitExposure } from '#shared/engine/kit-exposure.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { DEFAULT_REGION } from '#shared/engine/procedures/judged-bands.ts'
import { policyAt } from '#shared/engine/readiness/rules-in-force.ts'
import { AppError } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { policiesOrFirst } from '../first-policy.ts'
import { periodsFrom } from '../period-rows.ts'
import { readKitFace } from './kit-face.ts'

const SOURCE = 'FCC OET Bulletin 65, Edition 97-01, section 2; 47 CFR 1.1310(e)(1) Table 1'

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

interface Asked {
  readonly kitId: string
  readonly use: z.output<typeof exposureUse>
}

/** The power at the antenna comes from the kit's stored period: exposure is of the station as it was shown to work. */
export async function readKitExposure(tx: GroupTx, { kitId, use }: Asked): Promise<KitExposureRecord> {
  const [face, stored, [antenna], policies] = await Promise.all([
    readKitFace(tx, kitId),
    periodsFrom(tx, [kitId], tx.now),
    tx.sql<AntennaRow>(ANTENNA, [kitId]),
    policiesOrFirst(tx),
  ])
  const bands = stored.get(kitId)?.[0]?.capability.bands ?? []
  const known = bands.flatMap(({ band, wattsAtAntenna }) =>
    wattsAtAntenna === null ? [] : [{ band, pepAtAntennaW: wattsAtAntenna }],
  )
  const region = policyAt({ policies }, tx.now.getTime())?.settings.bandRegion ?? DEFAULT_REGION
  const place = { antennaLengthM: antenna?.length_m ?? undefined, feedOhm: antenna?.feed_ohm ?? undefined }
  const rows = kitExposure(known, { ...use, ...place }, region)
  if (isFailure(rows)) throw new AppError('request-invalid', rows.message)
  return {
    kitId,
    designation: face.designation,
    asOf: tx.now.toISOString(),
    use,
    antenna: antenna ? answeredAntenna(antenna) : null,
    bands: rows.map((row) => ({ ...row, warnings: [...row.warnings] })),
    unknownBands: bands.filter(({ wattsAtAntenna }) => wattsAtAntenna === null).map(({ band }) => band),
    caution: EXPOSURE_CAUTION,
    source: SOURCE,
  }
}

function answeredAntenna({ id, designation, length_m: lengthM, feed_ohm: feedOhm }: AntennaRow) {
  return { id, designation, lengthM, feedOhm }
}
