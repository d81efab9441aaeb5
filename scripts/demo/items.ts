import type { ItemDetails } from '#shared/contracts/item-details.ts'
import type { PlainDate } from '#shared/engine/plain-date.ts'
import type { Category } from '#shared/engine/vocabulary.ts'
import { AGM_35, batteriesOf, SPARE_BATTERIES, type DemoBattery } from './batteries.ts'
import { FORMER_TRANSFORMERS, TRANSFORMERS, type BatchKey, type BuildKey } from './builds.ts'
import * as details from './item-details.ts'
import { KIT_KINDS, type KindCode, type PlanLine } from './kit-kinds.ts'
import { KITS, numberOf, type DemoKit } from './kits.ts'
import type { PersonKey } from './people.ts'
import { rounded, randomOf } from './random.ts'

/** The things of the scenario, section 3. */
export interface DemoItem {
  readonly designation: string
  readonly details: ItemDetails
  /** Where it belongs from the beginning; null: it begins on the shelf in P1. */
  readonly packedIn: { readonly kit: string; readonly position: string } | null
  readonly acquiredOn: PlainDate
  readonly buildSheet: BuildKey | null
  readonly batch: BatchKey | null
  readonly owner: PersonKey | null
}

const PREFIXES: Readonly<Partial<Record<Category, string>>> = {
  'radio': 'RAD', 'transformer': 'XFM', 'antenna': 'ANT', 'feedline': 'FDL', 'jumper': 'JMP', 'battery': 'BAT',
  'charger': 'CHG', 'dc-lead': 'DCL', 'adapter-pouch': 'ADP', 'mast': 'MST', 'headset': 'HDS', 'computer': 'CMP',
  'interface': 'SIF', 'filter': 'DPX', 'solar-panel': 'SOL', 'solar-controller': 'SCC', 'distribution-box': 'DBX',
  'analyzer': 'VNA', 'wattmeter': 'WTM', 'dummy-load': 'DML', 'thermometer': 'IRT', 'battery-tester': 'BTT',
  'multimeter': 'DMM', 'calibration-kit': 'CAL', 'test-fixture': 'FIX', 'clamp-meter': 'CLM',
} // prettier-ignore

const item = (designation: string, what: ItemDetails, more: Partial<DemoItem> = {}): DemoItem => ({
  designation,
  details: what,
  packedIn: null,
  acquiredOn: bought(designation),
  buildSheet: null,
  batch: null,
  owner: null,
  ...more,
})

/** Some day of the years 2019 to 2023. */
function bought(designation: string): PlainDate {
  const random = randomOf(`bought ${designation}`)
  const [year, month, day] = [
    2019 + rounded(random() * 4, 0),
    1 + Math.floor(random() * 12),
    1 + Math.floor(random() * 28),
  ]
  return `${year}-${String(month).padStart(2, '0')}-${String(day).padStart(2, '0')}`
}

function detailsFor(category: Category, kind: KindCode): ItemDetails {
  switch (category) {
    case 'radio':
      return details.radio(kind)
    case 'antenna':
      return details.antenna(kind)
    case 'feedline':
      return details.feedline(kind)
    case 'dc-lead':
      return details.lead(kind)
    default: {
      const plain = (details.PLAIN_DETAILS as Partial<Record<Category, ItemDetails>>)[category]
      if (!plain) throw new Error(`The demo does not say what a ${category} is like`)
      return structuredClone(plain)
    }
  }
}

const isWire = (kind: KindCode) => details.bandsOf(kind)[0] === '40 m'

function builtBy(category: Category, kind: KindCode): Pick<DemoItem, 'buildSheet'> {
  return { buildSheet: category === 'antenna' && isWire(kind) ? 'wire' : null }
}

function itemsOfKit(kit: DemoKit): DemoItem[] {
  const batteries = batteriesOf(kit.designation)
  const { plan }: { plan: readonly PlanLine[] } = KIT_KINDS[kit.kind]
  return plan.flatMap(({ name: position, category, quantity }) => {
    const packedIn = { kit: kit.designation, position }
    if (category === 'battery')
      return batteries.splice(0, quantity).map((one) => ({ ...battery(one), packedIn }))
    if (category === 'transformer') return [{ ...transformerAtFirst(kit.designation), packedIn }]
    const designation = `${PREFIXES[category]}-${numberOf(kit.designation)}`
    return [item(designation, detailsFor(category, kit.kind), { packedIn, ...builtBy(category, kit.kind) })]
  })
}

const battery = ({ designation, pack }: DemoBattery) =>
  item(designation, details.battery(pack), { acquiredOn: pack.acquiredOn })

const BUILT_ON: Readonly<Record<BatchKey, PlainDate>> = { A: '2023-05-06', B: '2026-02-21', C: '2025-08-23' }

function ofBatch(designation: string, batch: BatchKey): DemoItem {
  const more = { buildSheet: 'transformer', batch, acquiredOn: BUILT_ON[batch] } as const
  return item(designation, details.transformer(), more)
}

/** Four kits begin with a transformer that batch B replaces. */
function transformerAtFirst(kit: string): DemoItem {
  const former = FORMER_TRANSFORMERS[kit]
  if (former)
    return item(former, details.formerTransformer(), { buildSheet: 'former', acquiredOn: '2019-06-15' })
  const [designation, { batch }] = Object.entries(TRANSFORMERS).find(([, one]) => one.kit === kit)!
  return ofBatch(designation, batch)
}

/** On the shelf in P1 from the beginning. */
const SPARES: readonly DemoItem[] = [
  ...['XFM-13', 'XFM-14', 'XFM-15'].map((designation) => ofBatch(designation, 'C')),
  ...SPARE_BATTERIES.map(battery),
  item('RAD-91', details.radio('HF-E')),
  item('RAD-92', details.radio('VU')),
  ...['FDL-91', 'FDL-92'].map((designation) => item(designation, details.feedline('HF-E'))),
  ...['FDL-93', 'FDL-94'].map((designation) => item(designation, details.feedline('VU'))),
  ...['ANT-91', 'ANT-92'].map((designation) =>
    item(designation, details.antenna('HF-E'), { buildSheet: 'wire' }),
  ),
  item('ANT-93', details.antenna('VU')),
  ...['CHG-91', 'CHG-92'].map((designation) => item(designation, detailsFor('charger', 'HF-E'))),
  item('CLM-91', detailsFor('clamp-meter', 'TB')),
]

/** Retired in the course of the story, outside the 260. */
export const RETIRED_LATER: readonly DemoItem[] = [
  item('RAD-93', details.radio('VU')),
  item('BAT-046', details.battery(AGM_35), { acquiredOn: AGM_35.acquiredOn }),
]

/** A member's own, never counted. */
export const LENT: readonly DemoItem[] = ['LNT-01', 'LNT-02'].map((designation) =>
  item(designation, details.radio('VU'), { owner: 'gideon' }),
)

/** What is there when the record begins, in the order of the kits. */
export const FIRST_ITEMS: readonly DemoItem[] = [
  ...KITS.flatMap(itemsOfKit),
  ...SPARES,
  ...RETIRED_LATER,
  ...LENT,
]

/** Batch B, built in February. */
export const BATCH_B: readonly DemoItem[] = Object.entries(TRANSFORMERS)
  .filter(([, { batch }]) => batch === 'B')
  .map(([designation]) => ofBatch(designation, 'B'))
