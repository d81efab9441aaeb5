import { describe, expect, it } from 'vitest'
import { cellsOf, pasteInto, plainNumber } from '@/components/test-form/paste-column.ts'
import type { ReadingRow } from '@/components/test-form/band-rows.ts'

const COLUMNS = [
  { key: 'frequencyMHz', label: 'Frequency', unit: 'MHz' },
  { key: 'swr', label: 'SWR' },
]
const BANDS = ['80 m', '40 m', '20 m'] as const

const row = (band: ReadingRow['band'], values: ReadingRow['values'] = {}): ReadingRow => ({ band, values })
const paste = (text: string, rows = BANDS.map((band) => row(band)), at = { row: 0, column: 0 }) =>
  pasteInto({ rows, columns: COLUMNS, bands: BANDS, ...at }, cellsOf(text) ?? [])
const figures = (rows: readonly ReadingRow[]) =>
  rows.map(({ band, values }) => [band, values.frequencyMHz, values.swr])

describe('what a spreadsheet puts on the clipboard', () => {
  it('is left to the browser when it is a single value', () => {
    expect(cellsOf('12.5')).toBeNull()
    expect(cellsOf('12.5\r\n')).toBeNull()
  })

  it('fills the rows below, whatever ends its lines', () => {
    for (const end of ['\n', '\r\n', '\r'])
      expect(figures(paste(['3.6', '7.1', '14.2'].join(end)).rows)).toEqual([
        ['80 m', '3.6', undefined],
        ['40 m', '7.1', undefined],
        ['20 m', '14.2', undefined],
      ])
  })

  it('fills several columns from tabs, with decimal commas', () => {
    expect(figures(paste('3,6\t1,4\n7,1\t2').rows)).toEqual([
      ['80 m', '3.6', '1.4'],
      ['40 m', '7.1', '2'],
      ['20 m', undefined, undefined],
    ])
  })

  it('begins where the cursor stands and keeps what stood in other cells', () => {
    const rows = [row('80 m', { frequencyMHz: '3.6' }), row('40 m', { frequencyMHz: '7.1' })]
    expect(figures(paste('1.4\n1.5', rows, { row: 0, column: 1 }).rows)).toEqual([
      ['80 m', '3.6', '1.4'],
      ['40 m', '7.1', '1.5'],
    ])
  })

  it('takes the band from a first cell that names one, and adds the rows that are missing', () => {
    const pasted = paste('Band\tMHz\tSWR\n40 m\t7.1\t1.5\n20m\t14.2\t1.6', [row('80 m')])
    expect(figures(pasted.rows)).toEqual([
      ['40 m', '7.1', '1.5'],
      ['20 m', '14.2', '1.6'],
    ])
    expect(pasted.taken).toBe(2)
  })

  it('leaves an empty cell as it was', () => {
    expect(figures(paste('\t1.4', [row('80 m', { frequencyMHz: '3.5' })]).rows)).toEqual([
      ['80 m', '3.5', '1.4'],
    ])
  })

  it('changes nothing when a cell cannot be read, and names its row and column', () => {
    const rows = [row('80 m', { swr: '1.1' }), row('40 m')]
    const pasted = paste('SWR\n1.4\nopen', rows, { row: 0, column: 1 })
    expect(pasted.rows).toEqual(rows)
    expect(pasted.faults).toEqual([
      { row: 3, column: 'SWR', message: expect.stringContaining('“open” is not a number') },
    ])
  })

  it('says so when there are more cells than fields, or far too many lines', () => {
    expect(paste('7.1\t1.5\t9').faults).toMatchObject([{ row: 1, column: 'cell 3' }])
    expect(paste('1\n'.repeat(300)).faults).toMatchObject([{ message: expect.stringContaining('300 lines') }])
  })
})

describe('a pasted figure', () => {
  it.each([
    ['14.2 MHz', 'MHz', '14.2'],
    ['14,2MHz', 'MHz', '14.2'],
    ['14.2 mhz', 'MHz', '14.2'],
    ['\u22123', 'dB', '-3'],
    ['50 W', 'W', '50'],
    ['21.5 °C', '°C', '21.5'],
    ['21.5 degC', '°C', '21.5'],
    ['1.5', '', '1.5'],
  ])('%s in a field of %s is %s', (cell, unit, text) => {
    expect(plainNumber(cell, unit)).toEqual({ text })
  })

  it.each([
    ['14200 kHz', 'MHz', 'is in kHz, the field takes MHz'],
    ['500 mW', 'W', 'is in mW, the field takes W'],
    ['70 °F', '°C', 'is in °F, the field takes °C'],
    ['2:1', '', 'the field takes a figure without a unit'],
    ['1,234.5', 'W', 'is not a number'],
    ['n/a', 'W', 'is not a number'],
  ])('%s in a field of %s is refused: %s', (cell, unit, message) => {
    expect(plainNumber(cell, unit)).toEqual({ fault: expect.stringContaining(message) })
  })
})
