import type { Step } from './deeds.ts'
import { atTheBench } from './records/bench.ts'
import { BOOT_STEPS } from './records/boots.ts'
import { CALIBRATION_STEPS } from './records/calibrations.ts'
import { CAPACITY_JOBS } from './records/capacities.ts'
import { COUNT_STEPS } from './records/counts.ts'
import { EFFICIENCY_JOBS } from './records/efficiency-tests.ts'
import { FEEDLINE_JOBS } from './records/feedlines.ts'
import { HEAT_JOBS } from './records/heat-tests.ts'
import { INSPECTION_STEPS } from './records/inspections.ts'
import { RADIO_JOBS } from './records/radio-checks.ts'
import { SWEEP_JOBS } from './records/sweeps.ts'
import { BEGINNING } from './stories/beginning.ts'
import { FLOOD } from './stories/flood.ts'
import { HOT_BATCH } from './stories/hot-batch.ts'
import { HOUSEKEEPING } from './stories/housekeeping.ts'
import { ICE_STORM } from './stories/ice-storm.ts'
import { LOANS_AND_ACCESS } from './stories/loans-and-access.ts'
import { RAIDED_KIT } from './stories/raided-kit.ts'
import { TWO_VALUES } from './stories/two-values.ts'

const BENCH = atTheBench([
  ...HEAT_JOBS,
  ...EFFICIENCY_JOBS,
  ...SWEEP_JOBS,
  ...FEEDLINE_JOBS,
  ...CAPACITY_JOBS,
  ...RADIO_JOBS,
])

/** Everything that the demo group ever did, in the order in which it reached the record. */
export const TIMELINE: readonly Step[] = [
  ...BEGINNING,
  ...BENCH,
  ...BOOT_STEPS,
  ...CALIBRATION_STEPS,
  ...INSPECTION_STEPS,
  ...COUNT_STEPS,
  ...HOT_BATCH,
  ...RAIDED_KIT,
  ...ICE_STORM,
  ...FLOOD,
  ...LOANS_AND_ACCESS,
  ...HOUSEKEEPING,
  ...TWO_VALUES,
].sort((a, b) => (a.at < b.at ? -1 : a.at > b.at ? 1 : 0))
