import type { NotIdentifiable } from '#shared/engine/heat-fit.ts'
import { whyTooShort } from '#shared/engine/heat-too-short.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { numberText, quantityText } from '@/format/quantity.ts'
import type { HeatPicture } from './heat-picture.ts'

/** Writes a stored quantity in the member's units. */
export type UnitText = (value: number, unit: string, digits?: number) => string

const minutes = (seconds: number) => quantityText(seconds / 60, 'min', 1)

/** What the picture answers: whether the key could be held as long as the rule asks. */
export function heatAnswer({ inputs, limits, peakC }: HeatPicture, text: UnitText): string {
  const { band, powerW, readings, keyUpAtS, stoppedAtLimit } = inputs
  const at = `${quantityText(powerW, 'W', 0)} on ${band}`
  const limit = text(limits.maxC, '°C', 0)
  const reached = readings.find(({ atS, temperatureC }) => atS <= keyUpAtS && temperatureC >= limits.maxC)
  if (reached || stoppedAtLimit) {
    const after = minutes(reached?.atS ?? keyUpAtS)
    return `It reached ${limit} after ${after} at ${at}; the rule asks for ${quantityText(limits.minutes, 'min', 1)} below that.`
  }
  return (
    `It got to ${text(peakC, '°C', 1)} in ${minutes(keyUpAtS)} at ${at}, ` +
    `${text(limits.maxC - peakC, 'K', 1)} below the limit of ${limit}.`
  )
}

/** Where the temperature was heading, as far as the log can say, and no further. */
export function heatOutlook(picture: HeatPicture, text: UnitText): string[] {
  const { fit, projection, limits } = picture
  if (isFailure(fit)) return [fit.message]
  if (!fit.identifiable) return [tooShort(picture, fit.because, text)]
  const allowed = picture.allowed === null ? [] : [picture.allowed]
  const end = (riseK: number) => text(picture.inputs.ambientC + riseK, '°C', 0)
  const range = `95\u00a0%: ${end(fit.steadyRiseLowK)} to ${end(fit.steadyRiseHighK)}`
  const settles = `settle near ${end(fit.steadyRiseK)} (${range})`
  const tau = `time constant ${minutes(fit.tauS)}, 95\u00a0%: ${numberText(fit.tauLowS / 60, 1)} to ${minutes(fit.tauHighS)}`
  const meets =
    projection?.state === 'curve' && projection.toLimitS !== null
      ? `reach ${text(limits.maxC, '°C', 0)} after about ${minutes(picture.inputs.keyUpAtS + projection.toLimitS)} and `
      : ''
  const sentences = [`Keyed on without a break it would ${meets}${settles}; ${tau}.`]
  if (fit.warnings.some(({ code }) => code === 'W_EXTRAPOLATED')) sentences.push(BEYOND)
  return [...sentences, ...allowed]
}

const BEYOND =
  'The log is shorter than the time constant, so the end lies far beyond what was read, and a core changes on the way there: it is a direction, not a forecast.'

function tooShort({ projection }: HeatPicture, because: readonly NotIdentifiable[], text: UnitText): string {
  const slope =
    projection?.state === 'slope'
      ? ` At its slope of ${text(projection.fit.slopeKPerS * 60, 'K', 1)} a minute the limit comes ` +
        `${minutes(projection.soonestS)} after the last reading at the soonest.`
      : ''
  return `This log is too short to say where it would end: ${whyTooShort(because)}.${slope}`
}
