import type { Band, Procedure } from '../vocabulary.ts'
import type { Moment } from './moment.ts'
import { standingOf, type Standing } from './standing.ts'
import type { ReadinessItem, Rule, TestFinding } from './types.ts'

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
  // Written out: copying an object here costs more than the judgement.
  const asked = (on: Band | null) => ({
    subjectId: item.id,
    procedures: [procedure],
    rule,
    band: on,
    raisedOn: band,
    failureLapses: true,
  })
  const whole = standingOf(moment, asked(null))
  // Without any failure of that procedure the bands cannot differ.
  if (!moment.tests(item.id, procedure).some(({ findings }) => findings.some(isFailure))) return whole
  const own = standingOf(moment, asked(band))
  if (own.finding && isFailure(own.finding)) return own
  const measured = own.test !== null
  return whole.state === 'failed' && (measured || !failsEverywhere) ? { ...whole, state: 'good' } : whole
}

const isFailure = ({ finding }: TestFinding) => finding === 'fail'
