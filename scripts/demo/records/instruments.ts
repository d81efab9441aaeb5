import type { PlainDate } from '#shared/engine/plain-date.ts'
import { PARTY } from '../dates.ts'

/** VNA-24 went to be repaired. */
export const ANALYSER_AWAY_ON: PlainDate = '2026-10-02'
/** Last day of the calibrations of WTM-23 and DMM-23. */
export const LAPSED_ON: PlainDate = '2026-08-15'

/**
 * Which of the two instruments was at hand: the benches take turns, but nobody measures with a wattmeter whose
 * calibration has lapsed (the four doubtful power tests aside), nor with what is not there.
 */
export function instrumentFor(prefix: 'VNA' | 'WTM' | 'IRT' | 'BTT', on: PlainDate, turn: number): string {
  if (prefix === 'VNA' && on >= ANALYSER_AWAY_ON) return 'VNA-23'
  // K-23 was away on the day of the annual count.
  if (on === PARTY.sep || (prefix === 'WTM' && on > LAPSED_ON)) return `${prefix}-24`
  return turn % 2 === 0 ? `${prefix}-23` : `${prefix}-24`
}
