import { describe, expect, it } from 'vitest'
import { columnLayout } from '@/components/picture/column-layout.ts'
import { efficiencyPicture } from '@/components/picture/efficiency-picture.ts'
import { feedlinePicture } from '@/components/picture/feedline-picture.ts'
import { radioPicture } from '@/components/picture/radio-picture.ts'
import { storedTest } from '../../../support/stored-test.ts'

const plain = (text: string) => text.replaceAll('\u00a0', ' ')

const pair = (outW: readonly number[], accuracyPercentOfReading?: number) =>
  efficiencyPicture(
    storedTest(
      {
        procedure: 'pair-loss',
        inputs: {
          meters: 'two',
          bands: (['40 m', '20 m', '10 m'] as const).map((band, at) => ({ band, inW: 50, outW: outW[at]! })),
        },
      },
      accuracyPercentOfReading === undefined ? {} : { instrument: { accuracyPercentOfReading } },
    ),
  )!

describe('the picture of a pair loss', () => {
  it('names the band that fails and by how much, then those that pass', () => {
    const picture = pair([42.32, 38.72, 27.38])
    expect(plain(picture.answer)).toBe(
      '10 m fails: 74 % comes through where at least 80 % is asked. 40 m and 20 m pass.',
    )
    expect(picture.columns.map(({ label }) => plain(label))).toEqual(['92 %', '88 %', '74 %'])
    expect(picture.more.join()).toContain('accuracy of the instrument is not on record')
  })

  it('says that all pass, with the worst', () => {
    expect(plain(pair([42.32, 38.72, 37]).answer)).toBe(
      'Every band passes: at worst (10 m) 86 % comes through where at least 80 % is asked.',
    )
  })

  it('carries the uncertainty and says what marginal means', () => {
    const picture = pair([42.32, 38.72, 32.5], 5)
    expect(picture.columns[2]).toMatchObject({ finding: 'marginal' })
    expect(plain(picture.answer)).toMatch(/^10 m is marginal: 81 ± 3 % comes through/)
    expect(picture.more.join()).toContain('inside the uncertainty')
    expect(plain(picture.table.rows[2]!.cells[1]!)).toBe('80.6 ± 3.3 %')
  })

  it('has the same numbers in its table as in its drawing', () => {
    const picture = pair([42.32, 38.72, 27.38])
    expect(picture.table.rows.map(({ cells }) => plain(cells.join(' | ')))).toEqual([
      '40 m | 92 % | 0.36 dB | 80 % at least | Pass',
      '20 m | 88 % | 0.56 dB | 80 % at least | Pass',
      '10 m | 74 % | 1.31 dB | 80 % at least | Fail',
    ])
  })
})

describe('the picture of a feedline', () => {
  const lineTest = (
    baselineDb: Record<string, number>,
    last: { band: '2 m'; lossDb: number; swrAtRadio: number }[],
  ) =>
    feedlinePicture(
      storedTest(
        {
          procedure: 'feedline-loss',
          inputs: { readings: [{ band: '2 m', lossDb: 3.1, swrAtRadio: 1.33 }], setsBaseline: false },
        },
        { feedline: { baselineDb, last } },
      ),
    )!

  it('measures from the baseline and repeats the warning that a better SWR hides a worse line', () => {
    const picture = lineTest({ '2 m': 1.4 }, [{ band: '2 m', lossDb: 2.2, swrAtRadio: 1.42 }])
    expect(plain(picture.answer)).toBe('2 m fails: the line takes 3.1 dB, 1.7 dB more than its baseline.')
    expect(picture.more.join()).toContain('Look for water')
    expect(picture.columns[0]).toMatchObject({ base: 1.4, limit: 2.2, under: 'SWR 1.33' })
  })

  it('is the baseline when there was none', () => {
    const picture = lineTest({}, [])
    expect(picture.answer).toContain('This is the baseline')
    expect(picture.limitWord).toBe('')
  })
})

describe('the picture of a radio', () => {
  it('measures each band against its power setting', () => {
    const inputs = {
      readings: [
        { band: '40 m' as const, settingW: 100, measuredW: 96 },
        { band: '10 m' as const, settingW: 50, measuredW: 38 },
      ],
      receives: true,
    }
    const picture = radioPicture(storedTest({ procedure: 'radio-check', inputs }))!
    expect(plain(picture.answer)).toBe('10 m fails: 38 W of 50 W. 40 m passes.')
    expect(picture.columns.map(({ limit, base }) => [limit, base])).toEqual([
      [80, 100],
      [40, 50],
    ])
  })
})

describe('the columns', () => {
  const place = { width: 358, height: 320, narrow: true }

  it('stay within the picture on a phone, whatever is drawn', () => {
    const at = columnLayout(pair([42.32, 38.72, 27.38], 5), place)
    for (const { left, y, high, low, limitY } of at.columns) {
      expect(left).toBeGreaterThanOrEqual(at.left)
      expect(left + at.columnWidth).toBeLessThanOrEqual(at.right)
      for (const line of [y, high, low, limitY!]) expect(line).toBeGreaterThan(0)
      expect(low).toBeGreaterThan(high)
    }
    expect(at.right).toBeLessThanOrEqual(place.width)
  })

  it('draw one limit across when all bands share it, and the words away from it', () => {
    const at = columnLayout(pair([42.32, 38.72, 27.38]), place)
    expect(at.sharedLimitY).toBe(at.columns[0]!.limitY)
    expect(at.columns.map(({ labelBelow }) => labelBelow)).toEqual([false, false, true])
  })
})
