import { lossDbFromEfficiency } from '../efficiency.ts'
import { isFailure } from '../outcome.ts'
import type { PlainDate } from '../plain-date.ts'
import { doubtAbout } from '../readiness/doubt.ts'
import type { Moment } from '../readiness/moment.ts'
import type { EpochMs, Evidence, TestFinding } from '../readiness/types.ts'
import { BANDS, type Band, type FindingWord, type Procedure } from '../vocabulary.ts'
import type { BuildMeasure } from './matching.ts'

/** The newest figure of a unit on a band, and the test behind it. */
export interface UnitFigure {
  readonly band: Band
  readonly measure: BuildMeasure
  readonly value: number
  /** Expanded uncertainty (k = 2) in the unit of `value`; null where the accuracy is not known. */
  readonly uncertainty: number | null
  readonly finding: FindingWord
  readonly testId: string
  readonly performedOn: PlainDate
  readonly performedAt: EpochMs
  /** A lapsed calibration or an open recall speaks against it. */
  readonly isInDoubt: boolean
  /** Of a heat test: how long the key was down and at what power. */
  readonly run: { readonly minutes: number; readonly powerW: number; readonly riseK: number } | null
}

/** What a heat test measured besides its finding, by the id of the test. */
export type Rises = ReadonlyMap<string, { readonly riseK: number; readonly minutes: number }>

const BY_FINDING = ['pair-loss', 'open-short-load', 'antenna-sweep'] as const satisfies readonly Procedure[]

/** Loss and SWR: the newest of each band, whatever procedure found it. In band order. */
export function newestFigures(moment: Moment, unitId: string): UnitFigure[] {
  const tests = BY_FINDING.flatMap((procedure) => moment.tests(unitId, procedure)).toSorted(newestFirst)
  const found = new Map<Band, UnitFigure>()
  for (const test of tests) {
    for (const finding of test.findings) {
      if (finding.band === null || found.has(finding.band)) continue
      const figure = figureOf(moment, test, finding)
      if (figure) found.set(finding.band, figure)
    }
  }
  return [...found.values()].toSorted(byBandOrder)
}

function figureOf(moment: Moment, test: Evidence, finding: TestFinding): UnitFigure | undefined {
  const { band, value, uncertainty, measure } = finding
  if (band === null || value === null) return undefined
  if (measure === 'swr') return { ...about(moment, test, finding), band, measure, value, uncertainty }
  if (measure !== 'efficiency') return undefined
  // More than all came out: within the meter's error, and no loss to compare.
  const lossDb = lossDbFromEfficiency(Math.min(1, value))
  if (isFailure(lossDb)) return undefined
  const uLossDb = uncertainty === null ? null : (10 / Math.LN10) * (uncertainty / value)
  return { ...about(moment, test, finding), band, measure: 'lossDb', value: lossDb, uncertainty: uLossDb }
}

function about(moment: Moment, test: Evidence, finding: TestFinding) {
  return {
    finding: finding.finding,
    testId: test.id,
    performedOn: test.performedOn,
    performedAt: test.performedAt,
    isInDoubt: doubtAbout(moment, test, finding.band) !== undefined,
    run: null,
  }
}

/** Rise per watt of every heat test, newest first; which of them are alike is for the pool to say. */
export function heatFigures(moment: Moment, unitId: string, rises: Rises): UnitFigure[] {
  return moment.tests(unitId, 'heat-test').flatMap((test) => {
    const [finding] = test.findings
    const rise = rises.get(test.id)
    const powerW = finding?.powerW ?? 0
    if (!finding?.band || !rise || powerW <= 0) return []
    const run = { minutes: rise.minutes, powerW, riseK: rise.riseK }
    const value = rise.riseK / powerW
    const figure = { band: finding.band, measure: 'kPerW', value, uncertainty: null } as const
    return [{ ...about(moment, test, finding), ...figure, run }]
  })
}

const newestFirst = (a: Evidence, b: Evidence) =>
  b.performedAt - a.performedAt || b.recordedAt - a.recordedAt || (a.id < b.id ? 1 : -1)

export const byBandOrder = (a: { band: Band }, b: { band: Band }) =>
  BANDS.indexOf(a.band) - BANDS.indexOf(b.band)
