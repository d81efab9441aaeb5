/** Every procedure with its inputs, and what a finding depends on besides them. */
import type { BandRegion } from '../band-edges.ts'
import type { Position, Rule } from '../readiness/types.ts'
import type { Accuracy } from './accuracy.ts'
import type { AntennaFileInputs } from './antenna-sweep-by-file.ts'
import type { AntennaSweepInputs } from './antenna-sweep.ts'
import type { BatteryCapacityInputs, BatteryFacts } from './battery-capacity.ts'
import type { CountInputs } from './count.ts'
import type { FeedlineFileInputs } from './feedline-loss-by-file.ts'
import type { FeedlineLossInputs } from './feedline-loss.ts'
import type { HeatFacts } from './heat-model.ts'
import type { HeatTestInputs } from './heat-test.ts'
import type { FeedlineHistory, LineFacts } from './line-history.ts'
import type { OnAirCheckInputs } from './on-air-check.ts'
import type { OpenShortLoadInputs, WindingFacts } from './open-short-load.ts'
import type { PairFileInputs } from './pair-loss-by-file.ts'
import type { PairLossInputs } from './pair-loss.ts'
import type { BootAndUpdateInputs, CalibrationInputs, InspectionInputs } from './plain-checks.ts'
import type { RadioCheckInputs } from './radio-check.ts'
import type { ReferencePart, SessionCheckInputs } from './session-check.ts'
import type { SweepBaseline } from './sweep-baseline.ts'

export type Performance =
  | { readonly procedure: 'heat-test'; readonly inputs: HeatTestInputs }
  | { readonly procedure: 'pair-loss'; readonly inputs: PairLossInputs | PairFileInputs }
  | { readonly procedure: 'open-short-load'; readonly inputs: OpenShortLoadInputs }
  | { readonly procedure: 'antenna-sweep'; readonly inputs: AntennaSweepInputs | AntennaFileInputs }
  | { readonly procedure: 'feedline-loss'; readonly inputs: FeedlineLossInputs | FeedlineFileInputs }
  | { readonly procedure: 'battery-capacity'; readonly inputs: BatteryCapacityInputs }
  | { readonly procedure: 'radio-check'; readonly inputs: RadioCheckInputs }
  | { readonly procedure: 'inspection'; readonly inputs: InspectionInputs }
  | { readonly procedure: 'count'; readonly inputs: CountInputs }
  | { readonly procedure: 'calibration'; readonly inputs: CalibrationInputs }
  | { readonly procedure: 'session-check'; readonly inputs: SessionCheckInputs }
  | { readonly procedure: 'boot-and-update'; readonly inputs: BootAndUpdateInputs }
  | { readonly procedure: 'on-air-check'; readonly inputs: OnAirCheckInputs }

/** What a transformer's own record and its earlier tests say. */
export type TransformerFacts = WindingFacts & HeatFacts

/** What a finding depends on besides the inputs. */
export interface KnownForTest {
  /** The rule in force on the day of the test; without one, the limits that every group begins with. */
  readonly rule: Pick<Rule, 'limits'> | undefined
  readonly instrument: Accuracy | null
  readonly battery: BatteryFacts
  readonly feedline: FeedlineHistory
  readonly line: LineFacts
  readonly transformer: TransformerFacts
  readonly sweep: { readonly baseline: SweepBaseline | null }
  /** Session checks: the parts of the group that are kept as references. */
  readonly references: readonly ReferencePart[]
  /** Where the group transmits: whose band edges count. */
  readonly region: BandRegion
  /** Counts: the load plan, and the number of the seal on record. */
  readonly plan: { readonly positions: readonly Position[]; readonly sealNumber: string | null }
}
