import { describe, expect, it } from 'vitest'
import { DETAIL_FIELDS } from '#shared/contracts/item-detail-fields.ts'
import { itemDetails } from '#shared/contracts/item-details.ts'
import type { Category } from '#shared/engine/vocabulary.ts'
import { detailField } from '@/format/detail-fields.ts'
import { describeDetails, detailRows, detailsBody, detailsSummary } from '@/format/item-details.ts'
import { quantityText, switchOf, type Units } from '@/format/quantity.ts'

const writer = (units: Units) => (value: number, unit: string, digits?: number) => {
  const change = switchOf(unit, units)
  return quantityText(change.shown(value), change.unit, digits)
}
const metric = writer({ temperature: 'C', length: 'm' })
const spaced = (text: string) => text.replaceAll('\u00a0', ' ')

describe('the details of an item', () => {
  it('have a label of their own in every category', () => {
    const categories = Object.keys(DETAIL_FIELDS) as Category[]
    const unnamed = categories.flatMap((category) =>
      Object.keys(DETAIL_FIELDS[category]).filter((name) => detailField(category, name).label === name),
    )
    expect(unnamed).toEqual([])
  })

  it('stand in the order in which they are asked for, what is not known left out', () => {
    const details = { category: 'battery', nominalV: 12.8, ratedAh: 30, chemistry: 'lifepo4' } as const
    expect(detailRows(details, metric).map(({ label, text }) => `${label}: ${spaced(text)}`)).toEqual([
      'Chemistry: Lithium iron phosphate',
      'Rated capacity: 30 Ah',
      'Nominal voltage: 12.8 V',
    ])
  })

  it('are written in the member’s units', () => {
    const details = { category: 'mast', heightM: 10 } as const
    const imperial = writer({ temperature: 'F', length: 'ft' })
    expect(spaced(detailRows(details, imperial)[0]!.text)).toBe('32.81 ft')
  })

  it('write bands in wavelength order, losses and currents with what they belong to', () => {
    const feedline = { category: 'feedline', lossDb: { '10 m': 0.9, '40 m': 0.4 } } as const
    expect(spaced(detailRows(feedline, metric)[0]!.text)).toBe('40 m 0.4 dB, 10 m 0.9 dB')
    const draw = [
      { watts: 20, amps: 8 },
      { watts: 100, amps: 20 },
    ]
    const radio = { category: 'radio' as const, bands: ['10 m' as const, '40 m' as const], drawA: draw }
    expect(detailRows(radio, metric).map(({ text }) => spaced(text))).toEqual([
      '40 m, 10 m',
      '20 A at 100 W, 8 A at 20 W',
    ])
  })

  it('are told in one line by their first facts', () => {
    const details = { category: 'transformer', core: 'FT240', turnsPrimary: 2, turnsSecondary: 14 } as const
    expect(spaced(detailsSummary(details, metric)).trim()).toBe(
      'core FT240, primary turns 2, secondary turns 14',
    )
  })
})

describe('details as they are typed', () => {
  const typed = {
    category: 'battery' as const,
    chemistry: 'agm',
    ratedAh: 26,
    nominalV: null,
    connector: '',
    // Typed before another category was chosen.
    bands: ['40 m'],
  }

  it('go to the service without what was left empty and what the category does not have', () => {
    const body = detailsBody(typed)
    expect(body).toEqual({ category: 'battery', chemistry: 'agm', ratedAh: 26 })
    expect(itemDetails.safeParse(body).success).toBe(true)
  })

  it('go without empty lists and empty losses', () => {
    const body = detailsBody({ category: 'feedline', lossDb: { '40 m': null, '20 m': null } })
    expect(body).toEqual({ category: 'feedline' })
    expect(detailsBody({ category: 'radio', bands: [], drawA: [] })).toEqual({ category: 'radio' })
  })

  it('keep what is no number, so that the contract can say so', () => {
    const body = detailsBody({ category: 'battery', ratedAh: 'thirty' })
    expect(itemDetails.safeParse(body).error?.issues[0]?.path).toEqual(['ratedAh'])
    expect(describeDetails({ category: 'battery', ratedAh: 'thirty' }, metric)['Rated capacity']).toBe(
      'thirty',
    )
  })
})
