import { ref } from 'vue'
import { describe, expect, it } from 'vitest'
import type { ReadingRow } from '@/components/test-form/band-rows.ts'
import { usePaste } from '@/components/test-form/usePaste.ts'

const COLUMNS = [
  { key: 'inW', label: 'Power in', unit: 'W' },
  { key: 'outW', label: 'Power out', unit: 'W' },
]
const BANDS = ['80 m', '40 m', '20 m'] as const

function pasted(text: string, start: ReadingRow[]) {
  const rows = ref<ReadingRow[]>(start)
  const { paste, undo, report } = usePaste(rows, () => ({ columns: COLUMNS, bands: BANDS }))
  const clipboardData = { getData: () => text }
  paste({ clipboardData, preventDefault: () => undefined } as unknown as ClipboardEvent, {
    row: 0,
    column: 0,
  })
  return { rows, undo, report }
}
const row = (band: ReadingRow['band'], values: ReadingRow['values'] = {}): ReadingRow => ({ band, values })

describe('undoing a paste', () => {
  it('puts back what stood there and takes out the rows that it added', () => {
    const { rows, undo, report } = pasted('50\n51\n52', [row('80 m', { inW: '9' }), row('40 m')])
    expect(rows.value.map(({ values }) => values.inW)).toEqual(['50', '51', '52'])
    undo()
    expect(rows.value).toEqual([row('80 m', { inW: '9' }), row('40 m')])
    expect(report.value).toBeNull()
  })

  it('leaves what was typed since, also over a pasted field and into an added row', () => {
    const { rows, undo } = pasted('50\n51\n52', [row('80 m', { inW: '9' }), row('40 m')])
    rows.value[0]!.values.outW = '40'
    rows.value[1]!.values.inW = '49'
    rows.value[2]!.values.outW = '38'
    undo()
    expect(rows.value).toEqual([
      row('80 m', { inW: '9', outW: '40' }),
      row('40 m', { inW: '49' }),
      row('20 m', { outW: '38' }),
    ])
  })

  it('leaves rows alone that were added or taken out since', () => {
    const { rows, undo } = pasted('50\n51', [row('80 m'), row('40 m', { inW: '8' })])
    rows.value.splice(0, 1)
    rows.value.push(row('20 m', { inW: '7' }))
    undo()
    expect(rows.value).toEqual([row('40 m', { inW: '8' }), row('20 m', { inW: '7' })])
  })
})
