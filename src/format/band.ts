import { BANDS, type Band } from '#shared/engine/vocabulary.ts'
import type { BandCapability } from '#shared/engine/readiness/period-types.ts'
import { dayText } from './day.ts'
import { numberText, quantityText } from './quantity.ts'

/** What a band strip needs of one band; the board knows less of a band than the kit page. */
export type BandCell = Pick<BandCapability, 'band' | 'state'> & Partial<BandCapability>

export const BAND_STATE_WORDS: Readonly<Record<BandCapability['state'], string>> = {
  proven: 'proven',
  limited: 'limited',
  'not-proven': 'not proven',
  out: 'out',
}

/** `40 m` is `40` under a strip where nearly all are metres; `70 cm` keeps its unit. */
export function shortBand(band: Band): string {
  return band.endsWith(' m') ? band.slice(0, -2) : band.replace(' ', '\u2009')
}

export function inBandOrder(cells: readonly BandCell[]): BandCell[] {
  return [...cells].sort((a, b) => BANDS.indexOf(a.band) - BANDS.indexOf(b.band))
}

/** Every band that some kit promises, longest wave first: the columns that strips of several kits share. */
export function bandColumns(strips: readonly (readonly BandCell[])[]): Band[] {
  const seen = new Set(strips.flatMap((cells) => cells.map(({ band }) => band)))
  return BANDS.filter((band) => seen.has(band))
}

/** `40 m: 74 W at the antenna, loss 1.3 dB, tested 12 Sep 2026`. */
export function bandSentence(cell: BandCell): string {
  if (cell.state === 'out')
    return `${cell.band}: ${cell.limit && cell.limit !== 'out' ? `out, ${cell.limit}` : 'out'}`
  const parts = [
    cell.state === 'proven' ? '' : BAND_STATE_WORDS[cell.state],
    cell.wattsAtAntenna == null ? '' : `${quantityText(cell.wattsAtAntenna, 'W', 0)} at the antenna`,
    cell.lossDb == null ? '' : `loss ${quantityText(cell.lossDb, 'dB', 1)}`,
    cell.limit ?? '',
    cell.testedOn ? `tested ${dayText(cell.testedOn)}` : '',
  ].filter((part) => part !== '')
  return `${cell.band}: ${parts.length > 0 ? parts.join(', ') : BAND_STATE_WORDS[cell.state]}`
}

/** The whole strip in one sentence for those who do not see it. */
export function stripSentence(cells: readonly BandCell[]): string {
  return cells.length === 0 ? 'No bands shown' : inBandOrder(cells).map(bandSentence).join('; ')
}

/** The transmit power that a strip is drawn against, W: the largest that any of its bands takes; null: nobody knows. */
export function fullWatts(cells: readonly BandCell[]): number | null {
  const watts = cells.flatMap(({ fraction, wattsAtAntenna }) =>
    fraction && wattsAtAntenna ? wattsAtAntenna / fraction : [],
  )
  return watts.length > 0 ? Math.max(...watts) : null
}

/** Height of a cell's filling: the share of the full transmit power that reaches the antenna, as a CSS percentage. */
export function fillHeight(cell: BandCell, full: number | null): string {
  if (cell.state === 'out' || cell.state === 'not-proven') return '0%'
  const share = full && cell.wattsAtAntenna != null ? cell.wattsAtAntenna / full : cell.fraction
  if (share == null) return '100%'
  return `${numberText(Math.min(1, Math.max(0.06, share)) * 100, 0)}%`
}
