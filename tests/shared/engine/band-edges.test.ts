import { describe, expect, it } from 'vitest'
import { BAND_TABLE, bandAt, bandEdges, type BandRegion } from '#shared/engine/band-edges.ts'
import { BANDS, type Band } from '#shared/engine/vocabulary.ts'

const REGIONS: BandRegion[] = ['itu-1', 'itu-2', 'itu-3', 'us-extra']

describe('BAND_TABLE', () => {
  // Calculation sheet, section 7: Region 1, 2, 3 and the United States, MHz.
  it.each<[Band, ...(readonly [number, number] | null)[]]>([
    ['160 m', [1.81, 1.85], [1.8, 2], [1.8, 2], [1.8, 2]],
    ['80 m', [3.5, 3.8], [3.5, 4], [3.5, 3.9], [3.5, 4]],
    ['60 m', [5.3515, 5.3665], [5.3515, 5.3665], [5.3515, 5.3665], [5.3515, 5.3665]],
    ['40 m', [7, 7.2], [7, 7.3], [7, 7.2], [7, 7.3]],
    ['30 m', [10.1, 10.15], [10.1, 10.15], [10.1, 10.15], [10.1, 10.15]],
    ['20 m', [14, 14.35], [14, 14.35], [14, 14.35], [14, 14.35]],
    ['17 m', [18.068, 18.168], [18.068, 18.168], [18.068, 18.168], [18.068, 18.168]],
    ['15 m', [21, 21.45], [21, 21.45], [21, 21.45], [21, 21.45]],
    ['12 m', [24.89, 24.99], [24.89, 24.99], [24.89, 24.99], [24.89, 24.99]],
    ['10 m', [28, 29.7], [28, 29.7], [28, 29.7], [28, 29.7]],
    ['6 m', [50, 52], [50, 54], [50, 54], [50, 54]],
    ['2 m', [144, 146], [144, 148], [144, 148], [144, 148]],
    ['1.25 m', null, [220, 225], null, [222, 225]],
    ['70 cm', [430, 440], [430, 440], [430, 440], [420, 450]],
  ])('holds %s', (band, ...edges) => {
    REGIONS.forEach((region, i) => {
      const found = bandEdges(BAND_TABLE, region, band)
      expect(found ? [found.lowHz / 1e6, found.highHz / 1e6] : null).toEqual(edges[i])
    })
  })

  it('says when it was drawn up and keeps the bands in order', () => {
    expect(BAND_TABLE.asOf).toMatch(/^\d{4}-\d{2}-\d{2}$/)
    for (const region of REGIONS) {
      const lows = BANDS.flatMap((band) => bandEdges(BAND_TABLE, region, band)?.lowHz ?? [])
      expect(lows).toEqual(lows.toSorted((a, b) => a - b))
    }
  })
})

describe('bandAt', () => {
  it('counts both edges in', () => {
    expect(bandAt(BAND_TABLE, 'itu-1', 7_000_000)).toBe('40 m')
    expect(bandAt(BAND_TABLE, 'itu-1', 7_200_000)).toBe('40 m')
    expect(bandAt(BAND_TABLE, 'itu-1', 7_200_001)).toBeUndefined()
    expect(bandAt(BAND_TABLE, 'itu-2', 7_200_001)).toBe('40 m')
    expect(bandAt(BAND_TABLE, 'itu-1', Number.NaN)).toBeUndefined()
  })

  it('counts the channels of 60 m in the United States only', () => {
    expect(bandAt(BAND_TABLE, 'us-extra', 5_333_400)).toBe('60 m')
    expect(bandAt(BAND_TABLE, 'us-extra', 5_333_401)).toBeUndefined()
    expect(bandAt(BAND_TABLE, 'itu-2', 5_332_000)).toBeUndefined()
  })
})
