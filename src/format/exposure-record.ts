import type { ExposureNote, ExposureRecord } from '#shared/contracts/kit-exposure.ts'
import { EMISSION_DUTIES, type EmissionId } from '#shared/engine/emission-duty.ts'
import { dayText } from './day.ts'
import { keepAwayText } from './keep-away.ts'
import { quantityText } from './quantity.ts'

type Units = Parameters<typeof keepAwayText>[1]

/** `RF exposure evaluated on 13 Oct 2026 by Ines; changed since: …`, for the page of the kit. */
export function exposureNoteText({ recordedOn, recordedBy, changed }: ExposureNote): string {
  const since = changed.length === 0 ? '' : `; configuration changed since: ${changed.join(', ')}`
  return `RF exposure evaluated on ${dayText(recordedOn)} by ${recordedBy}${since}.`
}

/** How the station was taken to be used: `CW, 5 min transmitting, then 5 min listening, antenna gain 2.2 dBi`. */
export function exposureUseText({ use, antenna }: ExposureRecord): string {
  const { name } = EMISSION_DUTIES[use.emission as EmissionId] ?? { name: use.emission }
  const cycle = `${quantityText(use.onMinutes, 'min', 1)} transmitting, then ${quantityText(use.offMinutes, 'min', 1)} listening`
  const gain = `${antenna?.designation ?? 'antenna not on record'} with ${quantityText(use.gainDbi, 'dBi', 2)}`
  return `${name}, ${cycle}, ${gain}`
}

/** A line a band: what was assumed and what follows, rounded up. */
export function exposureBandText(row: ExposureRecord['bands'][number], units: Units): string {
  const distances = `operators keep ${keepAwayText(row.controlled, units)}, others ${keepAwayText(row.general, units)}`
  return `${row.band} at ${quantityText(row.pepAtAntennaW, 'W', 0)}: ${distances}`
}
