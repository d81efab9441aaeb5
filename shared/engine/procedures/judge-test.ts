/** One door to all procedures: inputs and what is known about the subject in, results and findings out. */
import type { Outcome } from '../outcome.ts'
import { limitsOf } from '../policy/limits.ts'
import { judgeAntennaByFile } from './antenna-sweep-by-file.ts'
import { judgeAntennaSweep } from './antenna-sweep.ts'
import { judgeBatteryCapacity } from './battery-capacity.ts'
import { judgeCount } from './count.ts'
import { judgeFeedlineByFile } from './feedline-loss-by-file.ts'
import { judgeFeedlineLoss } from './feedline-loss.ts'
import { judgeHeatTest } from './heat-test.ts'
import type { Judgement } from './judgement.ts'
import { judgeOnAirCheck } from './on-air-check.ts'
import { judgeOpenShortLoad } from './open-short-load.ts'
import { judgePairLossByFile } from './pair-loss-by-file.ts'
import { judgePairLoss } from './pair-loss.ts'
import type { KnownForTest, Performance } from './performance.ts'
import { judgeBootAndUpdate, judgeCalibration, judgeInspection } from './plain-checks.ts'
import { judgeRadioCheck } from './radio-check.ts'
import { judgeSessionCheck } from './session-check.ts'
import type { TestFiles } from './test-files.ts'

export type { KnownForTest, Performance } from './performance.ts'

/** Raised with every change that can change a result, a finding or a verdict; stored with each test. */
export const ENGINE_VERSION = '4'

/**
 * `files` holds the parsed files that the inputs name, by their attachment's id, and the baseline's; see
 * `judgePerformance`, which reads them.
 */
export function judgeTest(
  performance: Performance,
  known: KnownForTest,
  files: TestFiles = {},
): Outcome<Judgement> {
  const { rule, instrument } = known
  switch (performance.procedure) {
    case 'heat-test':
      return judgeHeatTest(performance.inputs, limitsOf('heat-test', rule), {
        thermometer: instrument,
        facts: known.transformer,
      })
    case 'pair-loss':
      return judgePair(performance.inputs, known, files)
    case 'open-short-load':
      return judgeOpenShortLoad(performance.inputs, limitsOf('open-short-load', rule), { ...known, files })
    case 'antenna-sweep':
      return judgeAntenna(performance.inputs, known, files)
    case 'feedline-loss':
      return judgeFeedline(performance.inputs, known, files)
    case 'battery-capacity':
      return judgeBatteryCapacity(performance.inputs, {
        limits: limitsOf('battery-capacity', rule),
        facts: known.battery,
        tester: instrument,
      })
    case 'radio-check':
      return judgeRadioCheck(performance.inputs, limitsOf('radio-check', rule), instrument)
    case 'session-check':
      return judgeSessionCheck(performance.inputs, known.references)
    case 'count':
      return judgeCount(performance.inputs, known.plan)
    default:
      return judgeStated(performance)
  }
}

type Stated = 'inspection' | 'calibration' | 'boot-and-update' | 'on-air-check'

/** Procedures whose result a person states: nothing else decides. */
function judgeStated(performance: Extract<Performance, { procedure: Stated }>): Outcome<Judgement> {
  switch (performance.procedure) {
    case 'inspection':
      return judgeInspection(performance.inputs)
    case 'calibration':
      return judgeCalibration(performance.inputs)
    case 'boot-and-update':
      return judgeBootAndUpdate(performance.inputs)
    case 'on-air-check':
      return judgeOnAirCheck(performance.inputs)
  }
}

type InputsOf<P> = Extract<Performance, { procedure: P }>['inputs']

function judgePair(inputs: InputsOf<'pair-loss'>, known: KnownForTest, files: TestFiles): Outcome<Judgement> {
  const limits = limitsOf('pair-loss', known.rule)
  if (inputs.source === 'file') return judgePairLossByFile(inputs, limits, { ...known, files })
  return judgePairLoss(inputs, limits, known.instrument)
}

function judgeAntenna(
  inputs: InputsOf<'antenna-sweep'>,
  known: KnownForTest,
  files: TestFiles,
): Outcome<Judgement> {
  const limits = limitsOf('antenna-sweep', known.rule)
  const { baseline } = known.sweep
  if (inputs.source === 'file') return judgeAntennaByFile(inputs, limits, { ...known, files, baseline })
  return judgeAntennaSweep(inputs, limits, { analyzer: known.instrument, baseline })
}

function judgeFeedline(
  inputs: InputsOf<'feedline-loss'>,
  known: KnownForTest,
  files: TestFiles,
): Outcome<Judgement> {
  const line = { ...known, limits: limitsOf('feedline-loss', known.rule), history: known.feedline }
  if (inputs.source === 'file') return judgeFeedlineByFile(inputs, { ...line, files })
  return judgeFeedlineLoss(inputs, line)
}
