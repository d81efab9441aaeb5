/** One door to all procedures: inputs and what is known about the subject in, results and findings out. */
import type { Outcome } from '../outcome.ts'
import { limitsOf } from '../policy/limits.ts'
import type { Position, Rule } from '../readiness/types.ts'
import type { Accuracy } from './accuracy.ts'
import { judgeAntennaSweep, type AntennaSweepInputs } from './antenna-sweep.ts'
import { judgeBatteryCapacity, type BatteryCapacityInputs, type BatteryFacts } from './battery-capacity.ts'
import { judgeCount, type CountInputs } from './count.ts'
import { judgeFeedlineLoss, type FeedlineHistory, type FeedlineLossInputs } from './feedline-loss.ts'
import { judgeHeatTest, type HeatTestInputs } from './heat-test.ts'
import type { Judgement } from './judgement.ts'
import { judgePairLoss, type PairLossInputs } from './pair-loss.ts'
import {
  judgeBootAndUpdate,
  judgeCalibration,
  judgeInspection,
  type BootAndUpdateInputs,
  type CalibrationInputs,
  type InspectionInputs,
} from './plain-checks.ts'
import { judgeRadioCheck, type RadioCheckInputs } from './radio-check.ts'

export type Performance =
  | { readonly procedure: 'heat-test'; readonly inputs: HeatTestInputs }
  | { readonly procedure: 'pair-loss'; readonly inputs: PairLossInputs }
  | { readonly procedure: 'antenna-sweep'; readonly inputs: AntennaSweepInputs }
  | { readonly procedure: 'feedline-loss'; readonly inputs: FeedlineLossInputs }
  | { readonly procedure: 'battery-capacity'; readonly inputs: BatteryCapacityInputs }
  | { readonly procedure: 'radio-check'; readonly inputs: RadioCheckInputs }
  | { readonly procedure: 'inspection'; readonly inputs: InspectionInputs }
  | { readonly procedure: 'count'; readonly inputs: CountInputs }
  | { readonly procedure: 'calibration'; readonly inputs: CalibrationInputs }
  | { readonly procedure: 'boot-and-update'; readonly inputs: BootAndUpdateInputs }

/** What a finding depends on besides the inputs. */
export interface KnownForTest {
  /** The rule in force on the day of the test; without one, the limits that every group begins with. */
  readonly rule: Pick<Rule, 'limits'> | undefined
  readonly instrument: Accuracy | null
  readonly battery: BatteryFacts
  readonly feedline: FeedlineHistory
  /** Counts: the load plan, and the number of the seal on record. */
  readonly plan: { readonly positions: readonly Position[]; readonly sealNumber: string | null }
}

/** Raised with every change that can change a result or a finding; stored with each test. */
export const ENGINE_VERSION = '1'

export function judgeTest(performance: Performance, known: KnownForTest): Outcome<Judgement> {
  const { rule, instrument } = known
  switch (performance.procedure) {
    case 'heat-test':
      return judgeHeatTest(performance.inputs, limitsOf('heat-test', rule), instrument)
    case 'pair-loss':
      return judgePairLoss(performance.inputs, limitsOf('pair-loss', rule), instrument)
    case 'antenna-sweep':
      return judgeAntennaSweep(performance.inputs, limitsOf('antenna-sweep', rule), instrument)
    case 'feedline-loss':
      return judgeFeedlineLoss(performance.inputs, {
        limits: limitsOf('feedline-loss', rule),
        history: known.feedline,
        instrument,
      })
    case 'battery-capacity':
      return judgeBatteryCapacity(performance.inputs, {
        limits: limitsOf('battery-capacity', rule),
        facts: known.battery,
        tester: instrument,
      })
    case 'radio-check':
      return judgeRadioCheck(performance.inputs, limitsOf('radio-check', rule), instrument)
    case 'inspection':
      return judgeInspection(performance.inputs)
    case 'count':
      return judgeCount(performance.inputs, known.plan)
    case 'calibration':
      return judgeCalibration(performance.inputs)
    case 'boot-and-update':
      return judgeBootAndUpdate(performance.inputs)
  }
}
