import { BANDS, type Band } from '../vocabulary.ts'
import type { BandCapability } from './period-types.ts'

/**
 * The band strip of a kit as a short text, so that a page of the board carries no nested objects:
 * per band `<band><state><percent>:<watts>`, joined by commas, e.g. `3p85:85,5l79:79`. The band is its place in
 * `BANDS` in base 36, the state its first letter, the percent what reaches the antenna, the watts at the antenna;
 * `-` where nobody knows.
 */

export interface BandCell {
  readonly band: Band
  readonly state: BandCapability['state']
  /** Fraction of the radio's output that reaches the antenna, 0..1 in steps of 0.01. */
  readonly fraction: number | null
  /** At the antenna, whole W. */
  readonly wattsAtAntenna: number | null
}

const LETTERS = { proven: 'p', limited: 'l', 'not-proven': 'n', out: 'o' } as const
const STATES = { p: 'proven', l: 'limited', n: 'not-proven', o: 'out' } as const
const CODE = /^([0-9a-z])([plno])(\d+|-):(\d+|-)$/

export function packBands(bands: readonly BandCapability[]): string {
  return bands
    .map(({ band, state, fraction, wattsAtAntenna }) => {
      const percent = fraction === null ? '-' : String(Math.round(fraction * 100))
      const watts = wattsAtAntenna === null ? '-' : String(Math.round(wattsAtAntenna))
      return `${BANDS.indexOf(band).toString(36)}${LETTERS[state]}${percent}:${watts}`
    })
    .join(',')
}

/** The cells in the order in which they were packed; what cannot be read is left out. */
export function unpackBands(codes: string): BandCell[] {
  return codes.split(',').flatMap((code) => {
    const [, place, letter, percent, watts] = CODE.exec(code) ?? []
    const band = BANDS[parseInt(place ?? '', 36)]
    if (!band) return []
    return [
      {
        band,
        state: STATES[letter as keyof typeof STATES],
        fraction: percent === '-' ? null : Number(percent) / 100,
        wattsAtAntenna: watts === '-' ? null : Number(watts),
      },
    ]
  })
}
