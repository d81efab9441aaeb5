import type { z } from 'zod'
import type { ExposureEvaluation, exposureUse, KitExposureRecord } from '#shared/contracts/kit-exposure.ts'
import { EXPOSURE_CAUTION } from '#shared/engine/exposure.ts'
import { kitExposure } from '#shared/engine/kit-exposure.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { DEFAULT_REGION } from '#shared/engine/procedures/judged-bands.ts'
import type { BandCapability } from '#shared/engine/readiness/period-types.ts'
import { policyAt } from '#shared/engine/readiness/rules-in-force.ts'
import { AppError } from '../../errors.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { policiesOrFirst } from '../first-policy.ts'
import { periodsFrom } from '../period-rows.ts'
import { kitAntenna } from './kit-antenna.ts'
import { readKitFace } from './kit-face.ts'

const SOURCE = 'FCC OET Bulletin 65, Edition 97-01, section 2; 47 CFR 1.1310(e)(1) Table 1'

interface Asked {
  readonly kitId: string
  readonly use: z.output<typeof exposureUse>
}

export async function readKitExposure(tx: GroupTx, asked: Asked): Promise<KitExposureRecord> {
  const [face, evaluation] = await Promise.all([readKitFace(tx, asked.kitId), evaluateKit(tx, asked)])
  return {
    kitId: asked.kitId,
    designation: face.designation,
    asOf: tx.now.toISOString(),
    ...evaluation,
    caution: EXPOSURE_CAUTION,
  }
}

/** The power at the antenna comes from the kit's stored period: exposure is of the station as it was shown to work. */
export async function evaluateKit(tx: GroupTx, { kitId, use }: Asked): Promise<ExposureEvaluation> {
  const [stored, antenna, policies] = await Promise.all([
    periodsFrom(tx, [kitId], tx.now),
    kitAntenna(tx, kitId),
    policiesOrFirst(tx),
  ])
  const bands = stored.get(kitId)?.[0]?.capability.bands ?? []
  const region = policyAt({ policies }, tx.now.getTime())?.settings.bandRegion ?? DEFAULT_REGION
  const place = { antennaLengthM: antenna?.lengthM ?? undefined, feedOhm: antenna?.feedOhm ?? undefined }
  const rows = kitExposure(knownPowers(bands), { ...use, ...place }, region)
  if (isFailure(rows)) throw new AppError('request-invalid', rows.message)
  return {
    use,
    antenna,
    bands: rows.map((row) => ({ ...row, warnings: [...row.warnings] })),
    unknownBands: bands.filter(({ wattsAtAntenna }) => wattsAtAntenna === null).map(({ band }) => band),
    source: SOURCE,
  }
}

/** The bands of a period whose power at the antenna is known. */
export function knownPowers(bands: readonly BandCapability[]) {
  return bands.flatMap(({ band, wattsAtAntenna }) =>
    wattsAtAntenna === null ? [] : [{ band, pepAtAntennaW: wattsAtAntenna }],
  )
}
