import { isFailure } from '../outcome.ts'
import { MAX_SCORE, robustZ } from '../robust-z.ts'
import { RESOLUTIONS, type BuildMeasure, type Measured } from './matching.ts'
import { eachBand, type RowsOfBand } from './spread.ts'

/** A unit that stands apart from the others made the same way. */
export interface Departure extends Measured {
  readonly median: number
  /** Robust z-score: above 0 is worse, since every measure is the better the lower. */
  readonly score: number
  readonly isWorse: boolean
  readonly units: number
  /** Without the unit's name: "loses 1.55 dB on 10 m; the median of 15 units is 0.61 dB, ...". */
  readonly text: string
}

/**
 * Names the units that depart from their siblings, band by band and measure by measure, the worst first. With fewer
 * than five units on a band nobody can be told apart and nobody is named.
 */
export function departures(measured: readonly Measured[]): Departure[] {
  return eachBand(measured)
    .flatMap(departuresOnBand)
    .toSorted((a, b) => b.score - a.score)
}

function departuresOnBand({ measure, rows }: RowsOfBand): Departure[] {
  const scored = robustZ(
    rows.map(({ value }) => value),
    RESOLUTIONS[measure],
  )
  if (isFailure(scored)) return []
  return scored.departing.flatMap((at) => {
    const row = rows[at]
    const score = scored.scores[at]
    if (!row || score === undefined) return []
    const about = { score, median: scored.median, isWorse: score > 0, units: rows.length }
    return [{ ...row, ...about, text: departureText(row, about) }]
  })
}

const SAYS: Readonly<Record<BuildMeasure, { verb: string; unit: string; digits: number }>> = {
  lossDb: { verb: 'loses', unit: ' dB', digits: 2 },
  kPerW: { verb: 'warms by', unit: ' K per watt', digits: 2 },
  swr: { verb: 'shows an SWR of', unit: '', digits: 2 },
}

function departureText(
  { measure, band, value }: Measured,
  { score, median, units }: { score: number; median: number; units: number },
): string {
  const { verb, unit, digits } = SAYS[measure]
  const away = `${Math.abs(score).toFixed(1)} times the usual spread ${score > 0 ? 'above' : 'below'} it`
  const middle = `the median of ${units} units is ${median.toFixed(digits)}${unit}`
  return `${verb} ${value.toFixed(digits)}${unit} on ${band}; ${middle}, and this is ${away} (${MAX_SCORE} is the mark)`
}
