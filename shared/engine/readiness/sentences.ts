import type { PlainDate } from '../plain-date.ts'
import type { Band, Procedure } from '../vocabulary.ts'
import { amountText, dayText, onBand, PROCEDURE_WORDS, shortText } from './words.ts'
import type { Doubt } from './doubt.ts'
import type { HeatStanding } from './heat-standing.ts'
import type { BandCapability } from './period-types.ts'
import type { Decision, Position, RaisedCheck, ReadinessItem, TestFinding } from './types.ts'

export { capital, dayText, PROCEDURE_WORDS } from './words.ts'

/** Every sentence of a verdict, in one place: plain enough to be read out to a served agency. */

// Checks that did not come, or do not count.

export function lapsedText(
  name: string,
  procedure: Procedure,
  testedOn: PlainDate,
  band: Band | null,
): string {
  return `${name}: last ${PROCEDURE_WORDS[procedure]}${onBand(band)} on ${dayText(testedOn)}, its time has run out`
}

export function neverText(name: string, procedure: Procedure, band: Band | null): string {
  return `${name}: no ${PROCEDURE_WORDS[procedure]}${onBand(band)} on record`
}

export function raisedText(name: string, { procedure, band, reason, dueOn }: RaisedCheck): string {
  return `${name}: ${PROCEDURE_WORDS[procedure]}${onBand(band)} asked for by ${dayText(dueOn)} (${reason}) has not come`
}

export function doubtText(name: string, procedure: Procedure, doubt: Doubt, band: Band | null): string {
  const what = `${name}: ${PROCEDURE_WORDS[procedure]}${onBand(band)} is in doubt`
  if (doubt.kind === 'recall') return `${what}, ${doubt.check.reason}`
  if (doubt.kind === 'session-check-failed') return `${what}, ${doubt.instrument} failed its session check`
  const how = doubt.kind === 'calibration-lapsed' ? 'had lapsed' : 'failed'
  return `${what}, the calibration of ${doubt.instrument} ${how}`
}

export function failedCheckText(name: string, procedure: Procedure, finding: TestFinding): string {
  return `${name}: ${PROCEDURE_WORDS[procedure]} failed, ${finding.text}`
}

// Bands.

export function outText(band: Band, name: string, why: string): string {
  return `${band} out: ${name}, ${why}`
}

export function notCoveredText(band: Band, name: string): string {
  return `${band} out: ${name} does not cover it`
}

export function cappedText(name: string, band: Band, capW: number, failed: TestFinding | null): string {
  const why = failed ? `${name} ${failed.text}` : `${name} is heat tested to that power only`
  return `${band}: ${amountText(capW)} W at most, ${why}`
}

export function heatUnprovenText(
  name: string,
  band: Band,
  standing: HeatStanding & { state: 'never' | 'lapsed' | 'in-doubt' },
): string {
  if (standing.state === 'never') return neverText(name, 'heat-test', band)
  if (standing.state === 'in-doubt') return doubtText(name, 'heat-test', standing.doubt, band)
  if (standing.raised) return raisedText(name, standing.raised)
  if (!standing.by) return neverText(name, 'heat-test', band)
  return lapsedText(name, 'heat-test', standing.by.test.performedOn, band)
}

export function efficiencyText(name: string, band: Band, efficiency: number | null): string {
  const share = efficiency === null ? 'too little' : `${shortText(efficiency * 100)} %`
  return `${band}: ${name} passes on ${share} of the power`
}

export function lineLossText(name: string, band: Band, { value, text }: TestFinding): string {
  return `${band}: ${name} ${value === null ? text : `loses ${amountText(value)} dB`}`
}

export function radioLowText(name: string, band: Band, measuredW: number): string {
  return `${band}: ${name} gives ${amountText(measuredW)} W`
}

export function atAntennaText(text: string, watts: number | null): string {
  return watts === null ? text : `${text}, ${amountText(watts)} W at the antenna`
}

export function leadText(name: string, watts: number, ratedA: number): string {
  const power = watts > 0 ? `${amountText(watts)} W at most` : 'No power setting is low enough'
  return `${power}: ${name} carries ${amountText(ratedA)} A`
}

export function ratedBelowText(name: string, ratedW: number, promisedW: number): string {
  return `${amountText(ratedW)} W at most: ${name} is rated below the ${amountText(promisedW)} W promised`
}

/** The limit of a band in a few words, empty when there is none. */
export function bandLimitText(
  state: BandCapability['state'],
  watts: number | null,
  promisedW: number | null,
): string {
  if (state === 'proven') return ''
  if (state !== 'limited') return state === 'out' ? 'out' : 'not proven'
  const fewer = watts !== null && promisedW !== null && watts < promisedW
  return fewer ? `${amountText(watts)} W at most` : 'with limits'
}

// Batteries and modes.

export function notCountedText(name: string, fraction: number | null): string {
  const held =
    fraction === null ? 'failed its capacity test' : `holds ${shortText(fraction * 100)} % of its rating`
  return `${name} ${held} and is not counted`
}

export function noRatingText(name: string): string {
  return `${name} is not counted: its rated capacity is not on record`
}

export const HOURS_UNKNOWN = 'Hours not known: what the station draws is not on record'
export const NO_ENDURANCE = 'From mains or a vehicle only: no battery endurance'

export function hoursShortText(hours: number, promised: number): string {
  return `${shortText(hours)} h from its batteries instead of the ${amountText(promised)} h promised`
}

export function voiceOnlyText(name: string, why: string): string {
  return `Voice only: ${name} ${why}`
}

export const NEVER_BOOTED = 'was never booted and updated'
export const NO_MODE_LEFT = 'No promised mode is left without a computer that works'

export function bootedText(bootedOn: PlainDate): string {
  return `was last booted and updated on ${dayText(bootedOn)}`
}

// The kit itself.

export function brokenText(
  { designation, condition, conditionReason }: ReadinessItem,
  position: string,
): string {
  return `${designation} (${position}) is ${condition}${conditionReason ? `: ${conditionReason}` : ''}`
}

export function emptyText({ name, quantity }: Position, held: number): string {
  return quantity === 1 ? `Position ${name} is empty` : `Position ${name} holds ${held} of ${quantity}`
}

export function sealText(name: string): string {
  return `The seal of ${name} is broken or not the one on record`
}

export function shortCountText(countedOn: PlainDate, position: string, refilled: boolean): string {
  const text = `The count of ${dayText(countedOn)} found too little in ${position}`
  return refilled ? `${text}; it was filled since and not counted again` : text
}

export function decisionText({ kind, by, reason }: Decision, untilOn: PlainDate | null): string {
  const what = kind === 'lowered' ? 'lowered the verdict' : 'accepted a risk'
  return `${by} ${what}${untilOn ? ` until ${dayText(untilOn)}` : ''}: ${reason}`
}
