/** What an exposure record was about, against what the kit is now: a record holds for its configuration only. */
import { amountText } from './readiness/words.ts'
import type { Band } from './vocabulary.ts'

export interface ExposureConfiguration {
  readonly antenna: {
    readonly id: string
    readonly designation: string
    readonly lengthM: number | null
    readonly feedOhm: number | null
  } | null
  /** The bands whose power at the antenna is known. */
  readonly bands: readonly { readonly band: Band; readonly pepAtAntennaW: number }[]
}

/** A tenth of the power moves the distance by a twentieth: less is the scatter of measuring again. Our choice. */
const SAME_POWER = 0.1

/** A sentence for each change of antenna, band set or power; empty: the record is about the kit as it stands. */
export function exposureChanges(then: ExposureConfiguration, now: ExposureConfiguration): string[] {
  return [...antennaChanges(then.antenna, now.antenna), ...bandChanges(then.bands, now.bands)]
}

type Antenna = ExposureConfiguration['antenna']

function antennaChanges(then: Antenna, now: Antenna): string[] {
  if (then?.id !== now?.id) return [`the antenna is ${nameOf(now)}, it was ${nameOf(then)}`]
  const name = nameOf(now)
  const length = then?.lengthM === now?.lengthM ? [] : [`the length of ${name} on record`]
  const feed = then?.feedOhm === now?.feedOhm ? [] : [`the feed resistance of ${name} on record`]
  return [...length, ...feed]
}

const nameOf = (antenna: Antenna) => antenna?.designation ?? 'none'

type Bands = ExposureConfiguration['bands']

function bandChanges(then: Bands, now: Bands): string[] {
  const powerThen = new Map(then.map(({ band, pepAtAntennaW }) => [band, pepAtAntennaW]))
  const added = now.flatMap(({ band, pepAtAntennaW: watts }) => {
    const before = powerThen.get(band)
    if (before === undefined) return [`${band} was not in it`]
    if (Math.abs(watts - before) <= before * SAME_POWER) return []
    return [`${amountText(watts)} W at the antenna on ${band}, ${amountText(before)} W then`]
  })
  const known = new Set(now.map(({ band }) => band))
  const gone = then.flatMap(({ band }) => (known.has(band) ? [] : [`no power is known on ${band} any more`]))
  return [...added, ...gone]
}
