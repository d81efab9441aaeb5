/** Item details as requests carry them (unknown fields refused) and as answers do (unknown fields left out). */
import { z } from 'zod'
import type { Category } from '#shared/engine/vocabulary.ts'
import { DETAIL_FIELDS } from './item-detail-fields.ts'

const asked = <const C extends Category>(category: C) =>
  z.strictObject({ category: z.literal(category), ...DETAIL_FIELDS[category] })

const answered = <const C extends Category>(category: C) =>
  z.object({ category: z.literal(category), ...DETAIL_FIELDS[category] })

/** `category` names the kind of thing, the rest depends on it. */
export const itemDetails = z.discriminatedUnion('category', [
  asked('radio'),
  asked('transformer'),
  asked('antenna'),
  asked('feedline'),
  asked('jumper'),
  asked('battery'),
  asked('charger'),
  asked('dc-lead'),
  asked('adapter-pouch'),
  asked('mast'),
  asked('headset'),
  asked('computer'),
  asked('interface'),
  asked('filter'),
  asked('solar-panel'),
  asked('solar-controller'),
  asked('distribution-box'),
  asked('analyzer'),
  asked('wattmeter'),
  asked('dummy-load'),
  asked('thermometer'),
  asked('battery-tester'),
  asked('multimeter'),
  asked('clamp-meter'),
  asked('calibration-kit'),
  asked('test-fixture'),
  asked('accessory'),
])

export const itemDetailsRecord = z.discriminatedUnion('category', [
  answered('radio'),
  answered('transformer'),
  answered('antenna'),
  answered('feedline'),
  answered('jumper'),
  answered('battery'),
  answered('charger'),
  answered('dc-lead'),
  answered('adapter-pouch'),
  answered('mast'),
  answered('headset'),
  answered('computer'),
  answered('interface'),
  answered('filter'),
  answered('solar-panel'),
  answered('solar-controller'),
  answered('distribution-box'),
  answered('analyzer'),
  answered('wattmeter'),
  answered('dummy-load'),
  answered('thermometer'),
  answered('battery-tester'),
  answered('multimeter'),
  answered('clamp-meter'),
  answered('calibration-kit'),
  answered('test-fixture'),
  answered('accessory'),
])

export type ItemDetails = z.output<typeof itemDetails>

/** Categories that are built from a build sheet, whose details a sheet can hold. */
export const BUILT_CATEGORIES = ['transformer', 'antenna'] as const

export const buildDetails = z.discriminatedUnion('category', [asked('transformer'), asked('antenna')])
export const buildDetailsRecord = z.discriminatedUnion('category', [
  answered('transformer'),
  answered('antenna'),
])
