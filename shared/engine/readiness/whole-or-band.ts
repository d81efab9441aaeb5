import type { Band, Procedure } from '../vocabulary.ts'
import type { Moment } from './moment.ts'
import { candidates, standingOf, type Standing } from './standing.ts'
import type { ReadinessItem, Rule } from './types.ts'

interface Check {
  readonly item: ReadinessItem
  readonly procedure: Procedure
  readonly rule: Rule | undefined
  readonly band: Band
  /** What failed on another band speaks against a band that was never measured: water in a line, not a radio. */
  readonly failsEverywhere: boolean
}

/**
 * A check of an item as a whole whose readings are by band, and not on every band each time. Any newer test renews it;
 * a failure stays on its band until that band is measured again.
 */
export function standingOnBand(moment: Moment, check: Check): Standing {
  const { item, procedure, rule, band, failsEverywhere } = check
  const asked = { subjectId: item.id, procedures: [procedure], rule, failureLapses: true }
  const own = standingOf(moment, { ...asked, band })
  if (own.finding?.finding === 'fail') return own
  const whole = standingOf(moment, { ...asked, band: null })
  const measured = candidates(moment, { ...asked, band }).length > 0
  if (whole.state === 'failed' && (measured || !failsEverywhere)) return { ...whole, state: 'good' }
  return whole
}
