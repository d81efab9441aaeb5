import { describe, expect, it } from 'vitest'
import { controlChart, type ChartInput } from '#shared/engine/builds/control-chart.ts'

const chart = (own: number[], fields: Partial<ChartInput> = {}) =>
  controlChart({
    measure: 'lossDb',
    units: own.map((value, at) => ({ unitId: `u${at}`, value })),
    others: [],
    limit: 0.97,
    ...fields,
  })

const states = (own: number[], fields?: Partial<ChartInput>) =>
  chart(own, fields).points.map(({ state }) => state)

/** The spread is 0.119 dB, so the warning begins at 0.73. */
const CLOSE = [0.5, 0.56, 0.62, 0.7, 0.85]

describe('controlChart', () => {
  it('draws the limits of the batch itself from five units on', () => {
    const { lines, batchMedian } = chart([0.5, 0.6, 0.6, 0.7, 0.7])
    expect(batchMedian).toBe(0.6)
    expect(lines).toMatchObject({ median: 0.6, units: 5, from: 'batch' })
    expect(lines?.upper).toBeCloseTo(0.6 + 3.5 * 0.14826, 6)
    expect(lines?.lower).toBeCloseTo(0.6 - 3.5 * 0.14826, 6)
  })

  it('holds a smaller batch against all units by its build sheet', () => {
    expect(chart([0.6, 0.6], { others: [0.6, 0.7, 0.7] }).lines).toMatchObject({
      units: 5,
      from: 'build-sheet',
    })
    expect(chart([0.6, 0.6], { others: [0.6] }).lines).toBeNull()
  })

  it('never puts a limit below nothing', () => {
    expect(chart([0.1, 0.2, 0.3, 0.4, 0.5]).lines?.lower).toBe(0)
  })

  it('marks a unit over the limit, one that departs, and one near the limit', () => {
    const like = [0.5, 0.5, 0.52, 0.54, 0.54]
    expect(states([...like, 0.98])).toEqual([...like.map(() => 'in-line'), 'over-limit'])
    expect(states([...like, 0.8])).toEqual([...like.map(() => 'in-line'), 'departs'])
    expect(states(CLOSE)).toEqual(['in-line', 'in-line', 'in-line', 'in-line', 'near-limit'])
  })

  it('warns of a unit near the limit before one is over it', () => {
    expect(chart(CLOSE).sentences).toEqual([
      'One unit stands within 2 usual spreads of the limit: the next test may fail.',
    ])
  })

  it('warns when the usual spread reaches the limit, and is silent once a unit is over it', () => {
    const wide = [0.35, 0.45, 0.55, 0.65, 0.65]
    expect(chart(wide).sentences).toEqual([
      'No unit is over the limit, but the usual spread reaches it: the next one made like these may be.',
    ])
    expect(chart([...wide, 1.2]).sentences).toEqual([])
    expect(chart(wide, { limit: null })).toMatchObject({ warnFrom: null, sentences: [] })
  })

  it('says when all units of a batch are off together', () => {
    const { sentences } = chart([1.3, 1.31, 1.3, 1.32], { others: [0.6, 0.6, 0.65, 0.65, 0.6, 0.6] })
    expect(sentences).toEqual([
      expect.stringMatching(
        /^The batch as a whole stands apart: its median is \d+\.\d times the usual spread worse/,
      ),
    ])
  })

  it('answers for a batch without a measured unit', () => {
    expect(chart([])).toEqual({
      points: [],
      batchMedian: null,
      lines: null,
      limit: 0.97,
      warnFrom: null,
      sentences: [],
    })
  })
})
