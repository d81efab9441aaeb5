import type { PlainDate } from '#shared/engine/plain-date.ts'

/** Counted lines of the scenario, section 3: fourteen, some with lots. All lie in P1. */
export interface DemoLot {
  /** Empty for a line that is kept without lots. */
  readonly name: string
  readonly quantity: string
  readonly useByOn?: PlainDate
}

export interface DemoConsumable {
  readonly name: string
  readonly unit: string
  readonly minimum: string
  readonly lots: readonly DemoLot[]
  readonly notes?: string
}

const unsorted = (quantity: string): DemoLot[] => [{ name: '', quantity }]

export const SEALS = 'Seals, numbered'
export const SEAL_LOT = '0401-0520'
export const DRY_CELLS = 'AA cells'
export const OLD_CELLS = '2023'

export const CONSUMABLES: readonly DemoConsumable[] = [
  { name: 'Fuses, 5 A', unit: 'pieces', minimum: '20', lots: unsorted('45') },
  { name: 'Fuses, 10 A', unit: 'pieces', minimum: '20', lots: unsorted('38') },
  { name: 'Fuses, 15 A', unit: 'pieces', minimum: '20', lots: unsorted('26') },
  { name: 'Fuses, 25 A', unit: 'pieces', minimum: '20', lots: unsorted('22') },
  { name: 'Electrical tape', unit: 'rolls', minimum: '6', lots: unsorted('11') },
  {
    name: 'Self-fusing tape',
    unit: 'rolls',
    minimum: '4',
    lots: [{ name: '2024', quantity: '7', useByOn: '2029-06-30' }],
  },
  { name: SEALS, unit: 'pieces', minimum: '30', lots: [{ name: SEAL_LOT, quantity: '120' }] },
  {
    name: DRY_CELLS,
    unit: 'cells',
    minimum: '48',
    lots: [
      { name: OLD_CELLS, quantity: '40', useByOn: '2027-12-31' },
      { name: '2026', quantity: '72', useByOn: '2033-03-31' },
    ],
  },
  { name: 'Log pads', unit: 'pads', minimum: '24', lots: unsorted('41') },
  { name: 'Message forms', unit: 'pads', minimum: '12', lots: unsorted('18') },
  { name: 'Pencils', unit: 'pieces', minimum: '48', lots: unsorted('90') },
  { name: 'Cable ties', unit: 'pieces', minimum: '100', lots: unsorted('340') },
  { name: 'Guy line, 3 mm', unit: 'm', minimum: '60', lots: unsorted('182.5') },
  { name: 'Coax plugs', unit: 'pieces', minimum: '10', lots: unsorted('16') },
]
