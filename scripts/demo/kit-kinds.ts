import type { KitPromise } from '#shared/engine/readiness/types.ts'
import type { Band, Category } from '#shared/engine/vocabulary.ts'

/** Kit kinds of the scenario, section 3, with their load plans. */
export interface PlanLine {
  readonly name: string
  readonly category: Category
  readonly quantity: number
  readonly vital: boolean
}

export interface DemoKind {
  readonly name: string
  readonly station: boolean
  readonly promise: KitPromise
  readonly plan: readonly PlanLine[]
}

export const HF_BANDS = ['40 m', '20 m', '15 m', '10 m'] as const satisfies readonly Band[]
export const VHF_BANDS = ['2 m', '70 cm'] as const satisfies readonly Band[]

const line = (name: string, category: Category = name as Category, quantity = 1): PlanLine => ({
  name,
  category,
  quantity,
  vital: !['mast', 'headset', 'solar panel', 'controller'].includes(name),
})

const HF_PLAN: readonly PlanLine[] = [
  line('radio'),
  line('transformer'),
  line('wire', 'antenna'),
  line('feedline'),
  line('jumper'),
  line('battery A', 'battery'),
  line('battery B', 'battery'),
  line('charger'),
  line('DC lead', 'dc-lead'),
  line('adapter pouch', 'adapter-pouch'),
  line('mast'),
]

const VHF_PLAN: readonly PlanLine[] = [
  line('radio'),
  line('antenna'),
  line('feedline'),
  line('battery'),
  line('charger'),
  line('DC lead', 'dc-lead'),
  line('adapter pouch', 'adapter-pouch'),
  line('mast'),
  line('headset'),
]

const RELAY_PLAN: readonly PlanLine[] = [
  line('radio'),
  line('filter'),
  line('antenna'),
  line('feedline'),
  line('battery A', 'battery'),
  line('battery B', 'battery'),
  line('charger'),
  line('mast'),
  line('adapter pouch', 'adapter-pouch'),
]

const POWER_PLAN: readonly PlanLine[] = [
  line('batteries', 'battery', 4),
  line('charger'),
  line('solar panel', 'solar-panel'),
  line('controller', 'solar-controller'),
  line('distribution box', 'distribution-box'),
]

const BENCH_PLAN: readonly PlanLine[] = [
  line('analyser', 'analyzer'),
  line('wattmeter'),
  line('dummy load', 'dummy-load'),
  line('thermometer'),
  line('battery tester', 'battery-tester'),
  line('multimeter'),
  line('cal kit', 'calibration-kit'),
  line('2450-ohm fixture', 'test-fixture'),
]

const NO_BANDS: KitPromise = { bands: [], modes: [], watts: null, hours: null }

export const KIT_KINDS = {
  'HF-E': {
    name: 'End-fed HF voice',
    station: true,
    promise: { bands: HF_BANDS, modes: ['voice'], watts: 100, hours: 12, transmitPercent: 20 },
    plan: HF_PLAN,
  },
  VU: {
    name: 'VHF/UHF voice',
    station: true,
    promise: { bands: VHF_BANDS, modes: ['voice'], watts: 50, hours: 12, transmitPercent: 25 },
    plan: VHF_PLAN,
  },
  DG: {
    name: 'HF digital',
    station: true,
    promise: {
      bands: ['40 m', '20 m'],
      modes: ['digital', 'voice'],
      watts: 50,
      hours: 12,
      transmitPercent: 30,
    },
    plan: [...HF_PLAN, line('computer'), line('interface')],
  },
  XB: {
    name: 'VHF relay',
    station: true,
    promise: { bands: ['2 m'], modes: ['relay'], watts: 50, hours: 12, transmitPercent: 40 },
    plan: RELAY_PLAN,
  },
  PW: { name: 'Power', station: false, promise: NO_BANDS, plan: POWER_PLAN },
  TB: { name: 'Test bench', station: false, promise: NO_BANDS, plan: BENCH_PLAN },
} as const satisfies Record<string, DemoKind>

export type KindCode = keyof typeof KIT_KINDS

export const KIND_CODES = Object.keys(KIT_KINDS) as KindCode[]
