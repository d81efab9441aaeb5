import type { TestMaking } from '#shared/contracts/test-making.ts'
import { dayText } from '@/format/day.ts'
import { numberText } from '@/format/quantity.ts'

type Instrument = NonNullable<TestMaking['instrument']>

/** The data sheet of an instrument as recorded: `± 3 % of the reading, ± 1 % of full scale (200 W)`. */
export function accuracyText({ accuracy, unit }: Instrument): string {
  const of = (value: number) => `${numberText(value, 4)}${unit ? `\u00a0${unit}` : ''}`
  const parts = [
    accuracy.accuracyPercentOfReading === undefined
      ? ''
      : `± ${numberText(accuracy.accuracyPercentOfReading, 2)}\u00a0% of the reading`,
    accuracy.accuracyPercentOfFullScale === undefined
      ? ''
      : `± ${numberText(accuracy.accuracyPercentOfFullScale, 2)}\u00a0% of full scale` +
        (accuracy.fullScale === undefined ? '' : ` (${of(accuracy.fullScale)})`),
    accuracy.accuracyAbsolute === undefined ? '' : `± ${of(accuracy.accuracyAbsolute)}`,
    accuracy.resolution === undefined ? '' : `steps of ${of(accuracy.resolution)}`,
    accuracy.reflectionError === undefined
      ? ''
      : `error of a reflection ${numberText(accuracy.reflectionError, 4)}`,
  ].filter((part) => part !== '')
  return parts.length > 0
    ? parts.join(', ')
    : 'not on record: enter it on the page of the instrument, and later tests carry an uncertainty'
}

/** How the calibration stood on the day of the test, as known now. */
export function calibrationText({
  calibration: { state, before, after, untilOn, check },
}: Instrument): string {
  const last = before
    ? `last calibrated on ${dayText(before.performedOn)}`
    : 'no calibration before it on record'
  const until = untilOn ? `, good until ${dayText(untilOn)}` : ''
  const next = after ? dayText(after.performedOn) : ''
  switch (state) {
    case 'in-date':
      return `In date that day: ${last}${until}.`
    case 'confirmed':
      return `Shown to be right: ${last}${until}; calibrated again on ${next} and found good.`
    case 'vouched':
      return `Lapsed that day: ${last}${until}; a session check on ${dayText(check?.performedOn ?? '')} vouches for it at one value.`
    case 'check-failed':
      return `${last.charAt(0).toUpperCase()}${last.slice(1)}${until}; a session check failed on ${dayText(check?.performedOn ?? '')}, which puts these figures in doubt until a calibration shows otherwise.`
    case 'lapsed':
      return `Lapsed that day: ${last}${until}. The figures are in doubt until it is calibrated again.`
    case 'failed':
      return after
        ? `Failed since: ${last}${until}; failed on ${next}, which puts these figures in doubt.`
        : `Failed before: ${last} and failed, which puts these figures in doubt.`
    case 'none':
      return 'Nothing on record: its calibration was neither shown nor doubted.'
  }
}
