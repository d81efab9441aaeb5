import { later, onDay } from '../calendar.ts'
import { PARTY } from '../dates.ts'
import type { Step } from '../deeds.ts'
import { testName, type DemoTest } from '../demo-test.ts'
import { bandsOf } from '../item-details.ts'
import { lineTest } from '../records/feedlines.ts'

/** One feedline, measured twice without knowing of each other; the second value was wrong and is corrected. */

const LINE = 'FDL-12'
const BANDS = bandsOf('VU')
const performed = onDay(PARTY.sep, '13:05')

const right = lineTest(LINE, BANDS, PARTY.sep, 1)
const wrong: DemoTest = {
  ...right,
  performed,
  inputs: { readings: BANDS.map((band) => ({ band, lossDb: 2.1, swrAtRadio: 1.3 })) },
}
const corrected: DemoTest = {
  ...right,
  performed,
  operator: 'rafael',
  notes: 'Measured again from the picture of the screen.',
  supersedes: {
    test: testName(wrong),
    reason: 'Read with a damp adapter in the line; the picture shows the value without it',
  },
}

/** A phone that was offline on the day of the count, and a correction on the evening after. */
export const TWO_VALUES: readonly Step[] = [
  { at: later(performed, 360), by: 'rafael', deed: { do: 'test', test: wrong } },
  { at: '2026-09-13 19:30', by: 'josiah', deed: { do: 'test', test: corrected } },
]
