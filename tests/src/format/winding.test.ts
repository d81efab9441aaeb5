import { describe, expect, it } from 'vitest'
import { cardCautions, windingRows } from '@/format/winding.ts'
import { quantityText } from '@/format/quantity.ts'

type Sheet = Parameters<typeof windingRows>[0]

const SHEET: Sheet = {
  id: '01900000-0000-7000-8000-000000000001',
  name: '49:1',
  category: 'transformer',
  details: {
    category: 'transformer',
    core: '140-size toroid',
    cores: 2,
    turnsPrimary: 2,
    turnsSecondary: 14,
    capacitorPf: 100,
    ratedWatts: 100,
    bands: ['40 m', '10 m'],
  },
  winding: {
    construction: 'bifilar',
    awg: 18,
    meanTurnMm: 66,
    tailMm: 120,
    materialsCost: 18.5,
    currency: 'USD',
    cautions: 'Sharp edge.\nTape it.',
  },
  notes: '',
  batches: 0,
  items: 0,
  version: 1,
  createdAt: '2026-06-01T00:00:00Z',
  retiredAt: null,
  retiredReason: null,
}

const length = (metres: number) => quantityText(metres, 'm', 2)
const rowsOf = (sheet: Sheet) =>
  Object.fromEntries(
    windingRows(sheet, length).map(({ label, text }) => [label, text.replaceAll('\u00a0', ' ')]),
  )

describe('the winding card', () => {
  it('says core, turns, wire with its gauge, lengths to cut and cost', () => {
    expect(rowsOf(SHEET)).toMatchObject({
      Core: '2 × 140-size toroid',
      Turns: '2 : 14, 49 : 1, 2450 Ω for 50 Ω',
      // AWG 18 is 1.0237 mm: ASTM B258.
      Wire: 'AWG 18 (1.02 mm bare)',
      'Primary wire to cut': '0.37 m: 2 turns × 66 mm + 2 tails × 120 mm',
      'Secondary wire to cut': '1.16 m: 14 turns × 66 mm + 2 tails × 120 mm',
      'Materials cost': '18.50 USD',
      For: '40 m, 10 m, 100 W',
    })
  })

  it('leaves out what is not known, and says what the length needs', () => {
    const rows = rowsOf({ ...SHEET, winding: {} })
    expect(rows).not.toHaveProperty('Tap')
    expect(rows['Wire to cut']).toMatch(/^not known: enter how it is wound/)
  })

  it('cautions with the voltage that the turns make of the power, its own cautions first', () => {
    const cautions = cardCautions(SHEET)
    expect(cautions.slice(0, 2)).toEqual(['Sharp edge.', 'Tape it.'])
    // 100 W in 2450 ohm: 495 V, 700 V peak.
    expect(cautions[2]?.replaceAll('\u00a0', ' ')).toMatch(/^About 700 V peak at the high side at 100 W/)
    expect(cautions.at(-1)).toMatch(/^Local codes/)
  })
})
