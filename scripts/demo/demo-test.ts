import type { RecordTestInput } from '#shared/contracts/record-test.ts'
import type { Local } from './calendar.ts'
import type { PersonKey } from './people.ts'

type Body<P extends RecordTestInput['procedure']> = Extract<RecordTestInput, { procedure: P }>

/** The demo's readings were all taken by hand. */
type ByHand<Inputs> = Exclude<Inputs, { source: 'file' }>

interface Common {
  /** Designation of what was tested. */
  readonly subject: string
  readonly performed: Local
  readonly method: string
  /** Designation of the instrument. */
  readonly instrument?: string
  readonly instrumentNote?: string
  /** Who did the work, where somebody else recorded it. */
  readonly operator?: PersonKey
  readonly notes?: string
  /** `testName` of the test that this one corrects. */
  readonly supersedes?: { readonly test: string; readonly reason: string }
}

/** Everything that a body says, with names in the place of ids. */
type Measured<P extends Exclude<RecordTestInput['procedure'], 'count' | 'pair-loss'>> = Common & {
  readonly procedure: P
  readonly inputs: Body<P>['inputs']
}

export interface CountTest extends Common {
  readonly procedure: 'count'
  readonly inputs: {
    /** Positions that are not full, with what was found in them. */
    readonly short: Readonly<Record<string, { readonly found: number; readonly missing: readonly string[] }>>
    readonly extra: readonly string[]
    readonly sealFound: string | null
    readonly sealApplied: string | null
  }
}

export interface PairTest extends Common {
  readonly procedure: 'pair-loss'
  readonly partner: string
  readonly inputs: Omit<ByHand<Body<'pair-loss'>['inputs']>, 'partnerId'>
}

export type DemoTest =
  | Measured<'heat-test'>
  | Measured<'antenna-sweep'>
  | Measured<'feedline-loss'>
  | Measured<'battery-capacity'>
  | Measured<'radio-check'>
  | Measured<'inspection'>
  | Measured<'calibration'>
  | Measured<'boot-and-update'>
  | CountTest
  | PairTest

/** One of the demo's tests among all: a heat test says its band and power too, since several are run in a row. */
export function testName(test: DemoTest): string {
  const run = test.procedure === 'heat-test' ? ` ${test.inputs.band} ${test.inputs.powerW} W` : ''
  const corrects = test.supersedes ? ' corrected' : ''
  return `${test.subject} ${test.procedure}${run} ${test.performed}${corrects}`
}
