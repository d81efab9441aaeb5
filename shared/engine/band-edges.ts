/**
 * Amateur band edges, inclusive; licence class and national rules narrow them. Data that an administrator may
 * replace: every function takes the table. Source: ITU Radio Regulations, Article 5 (from memory, verify);
 * 47 CFR 97.301(a) and (b), Extra, Region 2 (2021 text confirmed for VHF and UHF; HF from memory, verify);
 * 60 m United States: FCC Report and Order released 9 December 2025 (confirmed by a report of it).
 */
import type { PlainDate } from './plain-date.ts'
import { BANDS, type Band } from './vocabulary.ts'

export const BAND_REGIONS = ['itu-1', 'itu-2', 'itu-3', 'us-extra'] as const
export type BandRegion = (typeof BAND_REGIONS)[number]

export interface BandEdges {
  readonly lowHz: number
  readonly highHz: number
  /** Channel centres outside the edges, each `channelWidthHz` wide. */
  readonly channelsHz?: readonly number[]
  readonly channelWidthHz?: number
  readonly note?: string
}

export interface BandTable {
  readonly asOf: PlainDate
  readonly regions: Readonly<Record<BandRegion, Readonly<Partial<Record<Band, BandEdges>>>>>
}

const mhz = (low: number, high: number, more: Omit<BandEdges, 'lowHz' | 'highHz'> = {}): BandEdges => ({
  lowHz: Math.round(low * 1e6),
  highHz: Math.round(high * 1e6),
  ...more,
})

/** 40 kHz to 1.7 MHz wide, the same in every region. */
const COMMON = {
  '30 m': mhz(10.1, 10.15),
  '20 m': mhz(14, 14.35),
  '17 m': mhz(18.068, 18.168),
  '15 m': mhz(21, 21.45),
  '12 m': mhz(24.89, 24.99),
  '10 m': mhz(28, 29.7),
} satisfies Partial<Record<Band, BandEdges>>

const REGION_2 = {
  ...COMMON,
  '160 m': mhz(1.8, 2),
  '80 m': mhz(3.5, 4),
  '60 m': mhz(5.3515, 5.3665),
  '40 m': mhz(7, 7.3),
  '6 m': mhz(50, 54),
  '2 m': mhz(144, 148),
  '1.25 m': mhz(220, 225),
  '70 cm': mhz(430, 440),
} satisfies Partial<Record<Band, BandEdges>>

export const BAND_TABLE: BandTable = {
  asOf: '2025-12-31',
  regions: {
    'itu-1': {
      ...COMMON,
      '160 m': mhz(1.81, 1.85),
      '80 m': mhz(3.5, 3.8),
      '60 m': mhz(5.3515, 5.3665),
      '40 m': mhz(7, 7.2),
      '6 m': mhz(50, 52, { note: 'National allocations.' }),
      '2 m': mhz(144, 146),
      '70 cm': mhz(430, 440),
    },
    'itu-2': REGION_2,
    'itu-3': {
      ...COMMON,
      '160 m': mhz(1.8, 2),
      '80 m': mhz(3.5, 3.9),
      '60 m': mhz(5.3515, 5.3665),
      '40 m': mhz(7, 7.2),
      '6 m': mhz(50, 54),
      '2 m': mhz(144, 148),
      '70 cm': mhz(430, 440),
    },
    'us-extra': {
      ...REGION_2,
      '60 m': mhz(5.3515, 5.3665, {
        channelsHz: [5_332_000, 5_348_000, 5_373_000, 5_405_000],
        channelWidthHz: 2800,
        note: '9.15 W ERP in the segment, 100 W ERP in the channels.',
      }),
      '1.25 m': mhz(222, 225, { note: '219 to 220 MHz is restricted.' }),
      '70 cm': mhz(420, 450),
    },
  },
}

/** The edges of a band in a region, or undefined where the region has no such band. */
export function bandEdges(table: BandTable, region: BandRegion, band: Band): BandEdges | undefined {
  return table.regions[region][band]
}

/** The band that holds a frequency in a region, edges and channels included, or undefined. */
export function bandAt(table: BandTable, region: BandRegion, frequencyHz: number): Band | undefined {
  return BANDS.find((band) => {
    const edges = table.regions[region][band]
    return edges !== undefined && holds(edges, frequencyHz)
  })
}

function holds(
  { lowHz, highHz, channelsHz = [], channelWidthHz = 0 }: BandEdges,
  frequencyHz: number,
): boolean {
  if (frequencyHz >= lowHz && frequencyHz <= highHz) return true
  return channelsHz.some((centreHz) => Math.abs(frequencyHz - centreHz) <= channelWidthHz / 2)
}
