/**
 * RF exposure and feed-point voltage of a kit as it stands: for each band the power that reaches its antenna, averaged
 * over both tiers' windows, the distance to keep and the voltage at the feed point. A record of what was assumed, not
 * a statement of compliance. Source: calculation sheet, sections 11 and 12.
 */
import { averagePowerW, worstOnFraction } from './average-power.ts'
import { BAND_TABLE, bandEdges, type BandRegion } from './band-edges.ts'
import { EMISSION_DUTIES, type EmissionId } from './emission-duty.ts'
import { AVERAGING_MINUTES, type ExposureTier } from './exposure-limits.ts'
import { exposureDistance } from './exposure.ts'
import { feedPointVoltage, type AcVoltage } from './feed-point.ts'
import { failure, isFailure, type Outcome, type Warning } from './outcome.ts'
import type { Band } from './vocabulary.ts'

export interface ExposureUse {
  readonly emission: EmissionId
  /** Over and listening, minutes: 0 to 1,000,000. */
  readonly onMinutes: number
  readonly offMinutes: number
  /** Of the antenna, dBi: -50 to 60. */
  readonly gainDbi: number
  /** The radiator's length where it is known, m. */
  readonly antennaLengthM?: number | undefined
  /** Resistance at the feed point where it is known, ohm. */
  readonly feedOhm?: number | undefined
}

export interface TierDistance {
  readonly averageW: number
  readonly distanceM: number
  /** False: 0.2 m or less, not covered by this method. */
  readonly covered: boolean
}

export interface BandExposure {
  readonly band: Band
  /** The band's upper edge: the limit falls with frequency. */
  readonly frequencyMHz: number
  readonly pepAtAntennaW: number
  readonly controlled: TierDistance
  readonly general: TierDistance
  /** Null where the feed point's resistance is not known. */
  readonly feedPoint: AcVoltage | null
  readonly warnings: readonly Warning[]
}

/** A row a band; the first failure of any, with the band in its message. */
export function kitExposure(
  bands: readonly { readonly band: Band; readonly pepAtAntennaW: number }[],
  use: ExposureUse,
  region: BandRegion,
): Outcome<BandExposure[]> {
  const rows: BandExposure[] = []
  for (const { band, pepAtAntennaW } of bands) {
    const edges = bandEdges(BAND_TABLE, region, band)
    if (!edges) continue
    const row = bandExposure({ band, pepAtAntennaW, frequencyMHz: edges.highHz / 1e6 }, use)
    if (isFailure(row))
      return failure(row.code, `${band}: ${row.message}`, row.field ? { field: row.field } : {})
    rows.push(row)
  }
  return rows
}

type Place = Pick<BandExposure, 'band' | 'frequencyMHz' | 'pepAtAntennaW'>

function bandExposure(place: Place, use: ExposureUse): Outcome<BandExposure> {
  const controlled = tierDistance('controlled', place, use)
  if (isFailure(controlled)) return controlled
  const general = tierDistance('general', place, use)
  if (isFailure(general)) return general
  const feedPoint = voltageAt(place, use)
  if (isFailure(feedPoint)) return feedPoint
  // The nearer of two distances may lie in the near field alone; where both do they say the same.
  const warnings = [
    ...new Map([...general.warnings, ...controlled.warnings].map((one) => [one.code, one])).values(),
  ]
  return {
    ...place,
    controlled: withoutWarnings(controlled),
    general: withoutWarnings(general),
    feedPoint,
    warnings,
  }
}

const withoutWarnings = ({ averageW, distanceM, covered }: TierDistance): TierDistance => ({
  averageW,
  distanceM,
  covered,
})

function tierDistance(
  tier: ExposureTier,
  { pepAtAntennaW, frequencyMHz }: Place,
  { emission, onMinutes, offMinutes, gainDbi, antennaLengthM }: ExposureUse,
): Outcome<TierDistance & { readonly warnings: readonly Warning[] }> {
  const onFraction = worstOnFraction({ on: onMinutes, off: offMinutes, window: AVERAGING_MINUTES[tier] })
  if (isFailure(onFraction)) return onFraction
  const emissionDuty = EMISSION_DUTIES[emission].duty
  const averageW = averagePowerW({ pepW: pepAtAntennaW, emissionDuty, onFraction })
  if (isFailure(averageW)) return averageW
  const length = antennaLengthM === undefined ? {} : { antennaLengthM }
  const found = exposureDistance({ averageW, gainDbi, frequencyMhz: frequencyMHz, ...length }, tier)
  if (isFailure(found)) return found
  const { distanceM, covered, warnings } = found
  return { averageW, distanceM, covered, warnings }
}

/** At full PEP: voltage follows the peak. */
function voltageAt({ pepAtAntennaW }: Place, { feedOhm }: ExposureUse): Outcome<AcVoltage | null> {
  return feedOhm === undefined ? null : feedPointVoltage({ powerW: pepAtAntennaW, resistanceOhm: feedOhm })
}
