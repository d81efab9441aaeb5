import { describe, expect, it } from 'vitest'
import { compareRecords } from '#shared/engine/builds/compare-records.ts'
import type { UnitFigure } from '#shared/engine/builds/unit-figures.ts'
import { valueOf } from '../../../support/value-of.ts'

const figure = (part: Partial<UnitFigure>): UnitFigure => ({
  band: '10 m',
  measure: 'lossDb',
  value: 1,
  uncertainty: null,
  finding: 'pass',
  testId: 't',
  performedOn: '2026-06-01',
  performedAt: 0,
  isInDoubt: false,
  run: null,
  ...part,
})

/** A sheet with one unit for each run: minutes keyed and rise. */
const sheet = (id: string, ...runs: [minutes: number, riseK: number][]) => ({
  id,
  record: {
    units: runs.map(([minutes, riseK], place) => ({
      unitId: `${id}${place}`,
      figures: [figure({}), figure({ measure: 'kPerW', run: { minutes, riseK, powerW: 50 } })],
    })),
    bands: [],
    departures: [],
  },
})
const runOf = (...sheets: ReturnType<typeof sheet>[]) => valueOf(compareRecords(sheets))

describe('the run that build sheets are compared by', () => {
  it('is one and the same where a hand on the key makes a few seconds', () => {
    // To a tenth of a minute these are 10.0 and 10.1.
    const { run } = runOf(sheet('a', [10.04, 30]), sheet('b', [10.06, 40]))
    expect(run).toMatchObject({ band: '10 m', powerW: 50 })
  })

  it('is not a run of another length, however close the rounded figures lie', () => {
    expect(runOf(sheet('a', [9.9, 30]), sheet('b', [10.04, 40])).run).toBeNull()
  })

  it('is the length that most sheets have, then most units', () => {
    const { run } = runOf(
      sheet('a', [10, 30], [5, 20], [5, 21]),
      sheet('b', [10.02, 40], [5, 22]),
      sheet('c', [10.05, 41]),
    )
    expect(run?.minutes).toBeGreaterThan(9.9)
  })
})
