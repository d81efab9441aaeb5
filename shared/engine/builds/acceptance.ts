import { limitsOf } from '../policy/limits.ts'
import { figure, percent } from '../procedures/judgement.ts'
import type { Moment } from '../readiness/moment.ts'
import { ruleFor } from '../readiness/rules-in-force.ts'
import { BANDS, type Band, type Category, type Procedure } from '../vocabulary.ts'

/** What a new unit has to show on one band before it goes into its first kit. */
export interface AcceptanceTest {
  readonly band: Band
  readonly procedure: Procedure
  /** "50 W for 10 min, below 85 °C". */
  readonly asks: string
}

/**
 * The acceptance of a new unit: its tests on every band that it is promised for, by the limits in force today. A unit
 * that was tried on its easiest band only has shown nothing about the others: the highest is the hardest for a core.
 * Where the policy asks a retest of some bands only, a new unit is still tried on all.
 */
export function acceptanceTests(
  moment: Moment,
  { category, bands }: { category: Category; bands: readonly Band[] },
): AcceptanceTest[] {
  const subject = { category, facts: {} }
  const rule = (procedure: Procedure, band: Band) =>
    ruleFor(moment.policy, subject, procedure, moment.today, band) ??
    ruleFor(moment.policy, subject, procedure, moment.today)
  const inOrder = BANDS.filter((band) => bands.includes(band))
  if (category === 'antenna') {
    return inOrder.map((band) => {
      const { maxSwr } = limitsOf('antenna-sweep', rule('antenna-sweep', band))
      return {
        band,
        procedure: 'antenna-sweep',
        asks: `SWR ${figure(maxSwr, 2)} at most at the working points`,
      }
    })
  }
  return inOrder.flatMap((band): AcceptanceTest[] => {
    const { minEfficiency } = limitsOf('pair-loss', rule('pair-loss', band))
    const { powerW, minutes, maxC } = limitsOf('heat-test', rule('heat-test', band))
    const heat = `${figure(powerW, 1)} W for ${figure(minutes, 1)} min, below ${figure(maxC, 1)} °C`
    return [
      { band, procedure: 'pair-loss', asks: `${percent(minEfficiency)} passed on, at least` },
      { band, procedure: 'heat-test', asks: heat },
    ]
  })
}
