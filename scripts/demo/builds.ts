import type { z } from 'zod'
import type { buildSheetBody } from '#shared/contracts/build-sheets.ts'
import type { PlainDate } from '#shared/engine/plain-date.ts'
import { HF_BANDS } from './kit-kinds.ts'

type SheetBody = z.input<typeof buildSheetBody>

/** How the transformers and the wires are made. */
export const BUILD_SHEETS = {
  transformer: {
    name: '49:1 on a 240-size toroid',
    details: {
      category: 'transformer',
      core: '240-size ferrite toroid',
      cores: 1,
      mix: 'DEMO',
      turnsPrimary: 2,
      turnsSecondary: 14,
      wire: 'enamelled copper, 1 mm',
      capacitorPf: 100,
      capacitorV: 3000,
      bands: [...HF_BANDS],
      ratedWatts: 100,
      connector: 'UHF socket',
    },
    winding: {
      construction: 'bifilar',
      awg: 18,
      meanTurnMm: 66,
      tailMm: 120,
      tap: 'Two turns twisted with the first two of fourteen',
      materialsCost: 18.5,
      currency: 'USD',
      cautions: 'The core is brittle and its edge cuts enamel: wrap it with tape first.',
    },
    notes: 'Two turns bifilar with the first two of fourteen; capacitor across the primary.',
  },
  former: {
    name: '49:1 on two stacked 140-size toroids',
    details: {
      category: 'transformer',
      core: '140-size ferrite toroid',
      cores: 2,
      mix: 'DEMO',
      turnsPrimary: 2,
      turnsSecondary: 14,
      wire: 'enamelled copper, 1 mm',
      capacitorPf: 100,
      capacitorV: 2000,
      bands: [...HF_BANDS],
      ratedWatts: 100,
      connector: 'UHF socket',
    },
    winding: {
      construction: 'tapped',
      awg: 18,
      meanTurnMm: 74,
      tailMm: 120,
      materialsCost: 21,
      currency: 'USD',
    },
    notes: 'The first ones, of 2019. Winding is slow: the stack slips.',
  },
  wire: {
    name: 'End-fed half-wave wire for 40 m',
    details: {
      category: 'antenna',
      design: 'end-fed half wave',
      bands: [...HF_BANDS],
      lengthM: 20.2,
      wire: 'stranded copper-clad steel, insulated',
      feedOhms: 2450,
      ratedWatts: 100,
    },
    notes: 'Strain relief at the insulator: a knot slips when the wire is iced.',
  },
} as const satisfies Record<string, SheetBody>

export type BuildKey = keyof typeof BUILD_SHEETS

export const BATCHES = {
  A: { name: 'Batch A', coreLot: 'L-2304', builtOn: '2023-04-22' },
  B: { name: 'Batch B', coreLot: 'L-2602', builtOn: '2026-02-14' },
  C: { name: 'Batch C', coreLot: 'L-2508', builtOn: '2025-08-16' },
} as const satisfies Record<string, { name: string; coreLot: string; builtOn: PlainDate }>

export type BatchKey = keyof typeof BATCHES

/** XFM-01 to XFM-15: which batch, and the kit that each was packed in. */
export const TRANSFORMERS: Readonly<Record<string, { batch: BatchKey; kit: string | null }>> = {
  'XFM-01': { batch: 'A', kit: 'K-01' },
  'XFM-02': { batch: 'A', kit: 'K-02' },
  'XFM-03': { batch: 'A', kit: 'K-03' },
  'XFM-04': { batch: 'A', kit: 'K-06' },
  'XFM-05': { batch: 'A', kit: 'K-07' },
  'XFM-06': { batch: 'A', kit: 'K-16' },
  'XFM-07': { batch: 'B', kit: 'K-04' },
  'XFM-08': { batch: 'B', kit: 'K-05' },
  'XFM-09': { batch: 'B', kit: 'K-08' },
  'XFM-10': { batch: 'B', kit: 'K-18' },
  'XFM-11': { batch: 'B', kit: null },
  'XFM-12': { batch: 'C', kit: 'K-17' },
  'XFM-13': { batch: 'C', kit: null },
  'XFM-14': { batch: 'C', kit: null },
  'XFM-15': { batch: 'C', kit: null },
}

/** What sat in four kits before batch B took its place; retired then. */
export const FORMER_TRANSFORMERS: Readonly<Record<string, string>> = {
  'K-04': 'XFM-81',
  'K-05': 'XFM-82',
  'K-08': 'XFM-83',
  'K-18': 'XFM-84',
}
