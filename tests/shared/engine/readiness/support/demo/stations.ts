import type { KitState } from '#shared/engine/readiness/types.ts'
import { boot, count } from '../more-evidence.ts'
import { capacity, efficiency, feedlineLoss, heatTest, radioCheck, sweep } from '../evidence.ts'
import { DG, HF_E, VU } from '../kinds.ts'
import { aKit, anItem, itemIn, withTests } from '../kits.ts'
import {
  BATCH_EFFICIENCY,
  battery,
  HF_BANDS,
  HF_LINE_DB,
  HF_RADIO,
  LITHIUM_30,
  part,
  VHF_BANDS,
  VHF_LINE_DB,
  type Batch,
  type Pack,
} from './things.ts'

/** Work parties of the scenario at which everything of a kit was proven. */
export const SPRING = '2026-03-14'
export const AUTUMN = '2026-09-12'

export interface HfParts {
  readonly transformer: string
  readonly batch?: Batch
  readonly batteries: readonly [string, string]
  readonly pack?: Pack
  readonly percent?: readonly [number, number]
  /** When everything was last tested; by default in spring and autumn. */
  readonly testedOn?: string
}

const HF_PARTS = ['radio', 'wire', 'feedline', 'jumper', 'charger', 'DC lead', 'adapter pouch', 'mast']
const HF_FACTS: Readonly<Record<string, object>> = {
  radio: HF_RADIO,
  wire: { bands: HF_BANDS },
  feedline: { lossDb: HF_LINE_DB },
  'DC lead': { ratedA: 25 },
}

const hfItems = (number: string, { transformer, batteries, pack = LITHIUM_30 }: HfParts) => [
  ...HF_PARTS.map((positionId) => part(number, positionId, HF_FACTS[positionId])),
  anItem({ id: transformer, category: 'transformer', positionId: 'transformer' }),
  battery(batteries[0], 'battery A', pack),
  battery(batteries[1], 'battery B', pack),
]

/** Everything the policy asks of an end-fed kit but the transformer's tests, passed; watts are the radio's rating. */
function provenHf(kit: KitState, percent: readonly [number, number], testedOn?: string): KitState {
  const [spring, autumn] = [testedOn ?? SPRING, testedOn ?? AUTUMN]
  const idOf = (positionId: string) => itemIn(kit, positionId).id
  return withTests(
    kit,
    sweep(idOf('wire'), { '40 m': 1.4, '20 m': 1.5, '15 m': 1.7, '10 m': 1.6 }, autumn),
    feedlineLoss(idOf('feedline'), HF_LINE_DB, autumn, 0.9),
    radioCheck(idOf('radio'), { '40 m': 100, '20 m': 100, '15 m': 100, '10 m': 100 }, spring),
    capacity(idOf('battery A'), percent[0], autumn),
    capacity(idOf('battery B'), percent[1], autumn),
    count(kit, autumn),
  )
}

/** Heat tests on 40, 20 and 10 m and efficiency on all four bands. */
export const transformerTests = (id: string, batch: Batch, on: string) => [
  heatTest(id, '40 m', on),
  heatTest(id, '20 m', on),
  heatTest(id, '10 m', on),
  efficiency(id, BATCH_EFFICIENCY[batch], on),
]

/** An end-fed kit with nothing wrong but what the transformer's own tests, given later, may say. */
export function hfKitBeforeTransformerTests(number: string, parts: HfParts): KitState {
  return provenHf(
    aKit(`K-${number}`, HF_E, hfItems(number, parts)),
    parts.percent ?? [96.3, 96.3],
    parts.testedOn,
  )
}

export function hfKit(number: string, parts: HfParts): KitState {
  const tests = transformerTests(parts.transformer, parts.batch ?? 'A', parts.testedOn ?? SPRING)
  return withTests(hfKitBeforeTransformerTests(number, parts), ...tests)
}

export function digitalKitBeforeTransformerTests(number: string, parts: HfParts, bootedOn: string): KitState {
  const items = [...hfItems(number, parts), part(number, 'computer'), part(number, 'interface')]
  const kit = aKit(`K-${number}`, DG, items)
  const radio = itemIn(kit, 'radio').id
  const withLoad = items.map((item) =>
    item.id === radio ? { ...item, facts: { ...HF_RADIO, meanLoadA: 7.24 } } : item,
  )
  const proven = provenHf({ ...kit, items: withLoad }, parts.percent ?? [97.3, 97.3], parts.testedOn)
  return withTests(proven, boot(itemIn(kit, 'computer').id, bootedOn))
}

export function digitalKit(number: string, parts: HfParts, bootedOn: string): KitState {
  const tests = transformerTests(parts.transformer, parts.batch ?? 'A', parts.testedOn ?? SPRING)
  return withTests(digitalKitBeforeTransformerTests(number, parts, bootedOn), ...tests)
}

export interface VhfParts {
  readonly battery: string
  readonly pack: Pack
  readonly percent?: number
  /** When everything was last tested; by default as at the other kits. */
  readonly testedOn?: string
}

const VHF_FACTS: Readonly<Record<string, object>> = {
  radio: { bands: VHF_BANDS, ratedWatts: 50, meanLoadA: 3.48 },
  antenna: { bands: VHF_BANDS },
  feedline: { lossDb: VHF_LINE_DB },
  'DC lead': { ratedA: 25 },
}

/** A VHF/UHF kit without tests. */
export function vhfKitUntested(number: string, { battery: id, pack }: VhfParts): KitState {
  const names = VU.positions.map((position) => position.name).filter((name) => name !== 'battery')
  const items = names.map((name) => part(number, name, VHF_FACTS[name]))
  return aKit(`K-${number}`, VU, [...items, battery(id, 'battery', pack)])
}

export function vhfKit(number: string, parts: VhfParts): KitState {
  const { testedOn, percent = 98.2 } = parts
  const kit = vhfKitUntested(number, parts)
  return withTests(
    kit,
    sweep(`ANT-${number}`, { '2 m': 1.4, '70 cm': 1.6 }, testedOn ?? AUTUMN),
    feedlineLoss(`FDL-${number}`, VHF_LINE_DB, testedOn ?? AUTUMN),
    radioCheck(`RAD-${number}`, { '2 m': 50, '70 cm': 50 }, testedOn ?? SPRING, 50),
    capacity(parts.battery, percent, testedOn ?? AUTUMN),
    count(kit, testedOn ?? AUTUMN),
  )
}
