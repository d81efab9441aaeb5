import type { z } from 'zod'
import type { createPolicy } from '#shared/contracts/policy.ts'
import { NO_SOURCE } from '#shared/engine/policy/default-policy.ts'

/** Policy "DEMO-1" of the scenario, section 4. The ids of its rules are added when it is put into force. */
type Body = z.input<typeof createPolicy.body>
type RuleWithoutId<R> = R extends { id: string } ? Omit<R, 'id'> : never
export type DemoRule = RuleWithoutId<Body['rules'][number]>

const VRLA = 'IEEE 1188-2005, written for stationary batteries; applying it to a kit is our choice'

const yearly = { intervalMonths: 12, vital: true, source: NO_SOURCE } as const

const TRANSMIT_CHAIN: readonly DemoRule[] = [
  {
    ...yearly,
    category: 'transformer',
    procedure: 'heat-test',
    applies: { bands: ['40 m', '20 m', '10 m'] },
    limits: { powerW: 50, minutes: 10, maxC: 85, maxSwrChange: 0.2 },
    reason:
      'A core that runs hot turns transmit power into heat and cracks; also after a drop, a rewinding or a recall.',
  },
  {
    ...yearly,
    category: 'transformer',
    procedure: 'pair-loss',
    limits: { minEfficiency: 0.8 },
    reason: 'A fifth of the power lost is the most that a kit can carry without being told.',
  },
  {
    ...yearly,
    category: 'antenna',
    procedure: 'antenna-sweep',
    limits: { maxSwr: 2.5 },
    reason: 'A stretched wire or a broken element moves the resonance; also after use in a storm.',
  },
  {
    ...yearly,
    category: 'feedline',
    procedure: 'feedline-loss',
    limits: { maxRiseDb: 0.8 },
    reason: 'Water raises the loss and flatters the SWR: only the loss against its baseline tells.',
  },
  {
    ...yearly,
    category: 'radio',
    procedure: 'radio-check',
    limits: { minPowerFraction: 0.8 },
    reason: 'Power stages fade without a sound.',
  },
]

const BATTERIES: readonly DemoRule[] = [
  {
    ...yearly,
    category: 'battery',
    procedure: 'battery-capacity',
    applies: { chemistry: 'lifepo4' },
    limits: { minCapacityFraction: 0.8 },
    reason: 'A battery below 80 % cannot be relied on: it counts for no hours.',
  },
  {
    ...yearly,
    category: 'battery',
    procedure: 'battery-capacity',
    applies: { chemistry: 'agm' },
    intervalMonths: 6,
    limits: { minCapacityFraction: 0.8 },
    reason:
      'All of ours are older than three years, when lead-acid wears fast. Below 80 % it counts for no hours.',
    source: VRLA,
  },
]

const calibrated = (category: DemoRule['category'], reason: string): DemoRule => ({
  ...yearly,
  category,
  procedure: 'calibration',
  reason,
})

const INSTRUMENTS: readonly DemoRule[] = [
  calibrated('wattmeter', 'Every figure in watts stands on it: results after it lapsed are in doubt.'),
  calibrated('multimeter', 'Voltages and cut-offs stand on it.'),
  calibrated('clamp-meter', 'Currents stand on it.'),
  calibrated('thermometer', 'Heat tests stand on it; ice and boiling water are a good check.'),
  calibrated('battery-tester', 'Capacities stand on it.'),
  calibrated(
    'analyzer',
    'Sweeps stand on it; the calibration of each session does not replace the comparison.',
  ),
]

const KITS: readonly DemoRule[] = [
  {
    ...yearly,
    category: 'kit',
    procedure: 'count',
    intervalMonths: 6,
    reason: 'Parts are borrowed. A count follows every opening too.',
  },
  {
    ...yearly,
    category: 'computer',
    procedure: 'boot-and-update',
    intervalMonths: 1,
    warningDays: 7,
    vital: false,
    limits: { voiceOnlyAfterMonths: 3 },
    reason: 'A computer that slept for months updates for an hour when it is needed.',
  },
]

export const DEMO_POLICY: Omit<Body, 'rules' | 'effectiveOn'> & { rules: readonly DemoRule[] } = {
  name: 'DEMO-1',
  reason: 'What we ask of our own equipment. Every value can be changed; most have no published source.',
  // Stated at room temperature, where nothing is taken off for cold, and linear in the current.
  settings: { usableFraction: { lifepo4: 0.9, agm: 0.5 }, enduranceC: 20, peukert: 1, temperatureFactor: 1 },
  rules: [...TRANSMIT_CHAIN, ...BATTERIES, ...INSTRUMENTS, ...KITS],
}
