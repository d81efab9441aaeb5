/**
 * The policy that a group begins with. Few intervals were ever published for portable kits, and the standards for
 * stationary batteries exclude them in so many words: every value here is a starting point that a group edits, and
 * says where it comes from.
 */
import type { PolicySettings, Rule } from '../readiness/types.ts'
import type { Chemistry } from '../vocabulary.ts'

export type NewRule = Omit<Rule, 'id'> & { readonly reason: string; readonly source: string }

export const NO_SOURCE = 'common practice, no source'

const VRLA = 'IEEE 1188-2005, written for stationary batteries; applying it to a kit is our choice'
const VENTED = 'IEEE 450-2002, written for stationary batteries; applying it to a kit is our choice'

const common = { warningDays: 30, vital: true, applies: {}, limits: {}, source: NO_SOURCE } as const

const capacity = (
  chemistry: Chemistry,
  rule: Pick<NewRule, 'intervalMonths' | 'reason' | 'source'> & { minAgeYears?: number },
): NewRule => ({
  ...common,
  category: 'battery',
  procedure: 'battery-capacity',
  applies: {
    chemistry,
    ...(rule.minAgeYears !== undefined && { minAgeYears: rule.minAgeYears }),
  },
  limits: { minCapacityFraction: 0.8 },
  intervalMonths: rule.intervalMonths,
  reason: rule.reason,
  source: rule.source,
})

const BELOW_80 = 'A battery below 80 % cannot be relied on: it counts for no hours.'
const ageing = `${BELOW_80} Lead-acid wears faster from its third year on.`

const batteries: readonly NewRule[] = [
  capacity('agm', { intervalMonths: 12, reason: BELOW_80, source: VRLA }),
  capacity('agm', { intervalMonths: 6, minAgeYears: 3, reason: ageing, source: VRLA }),
  capacity('gel', { intervalMonths: 12, reason: BELOW_80, source: VRLA }),
  capacity('gel', { intervalMonths: 6, minAgeYears: 3, reason: ageing, source: VRLA }),
  capacity('flooded', { intervalMonths: 12, reason: BELOW_80, source: VENTED }),
  capacity('flooded', { intervalMonths: 6, minAgeYears: 3, reason: ageing, source: VENTED }),
  capacity('lifepo4', { intervalMonths: 12, reason: BELOW_80, source: NO_SOURCE }),
  capacity('lithium-ion', { intervalMonths: 12, reason: BELOW_80, source: NO_SOURCE }),
  capacity('nimh', {
    intervalMonths: 6,
    reason: `${BELOW_80} Handheld packs fade sooner and lose charge on the shelf.`,
    source: NO_SOURCE,
  }),
]

const transmitChain: readonly NewRule[] = [
  {
    ...common,
    category: 'transformer',
    procedure: 'heat-test',
    applies: { bands: ['40 m', '20 m', '10 m'] },
    intervalMonths: 12,
    limits: { powerW: 50, minutes: 10, maxC: 85, maxSwrChange: 0.2 },
    reason:
      'A core that runs hot turns transmit power into heat and cracks. The highest band is the hardest.',
  },
  {
    ...common,
    category: 'transformer',
    procedure: 'pair-loss',
    intervalMonths: 12,
    limits: { minEfficiency: 0.8 },
    reason: 'A fifth of the power lost is the most that a kit can carry without being told.',
  },
  {
    ...common,
    category: 'antenna',
    procedure: 'antenna-sweep',
    intervalMonths: 12,
    limits: { maxSwr: 2.5 },
    reason:
      'A stretched wire or a broken element moves the resonance; ask for a sweep after every storm too.',
  },
  {
    ...common,
    category: 'feedline',
    procedure: 'feedline-loss',
    intervalMonths: 12,
    limits: { maxRiseDb: 0.8 },
    reason: 'Water raises the loss and flatters the SWR: only the loss against its baseline tells.',
  },
  {
    ...common,
    category: 'radio',
    procedure: 'radio-check',
    intervalMonths: 12,
    limits: { minPowerFraction: 0.8 },
    reason: 'Power stages fade without a sound.',
  },
]

const calibrated = (category: NewRule['category'], reason: string): NewRule => ({
  ...common,
  category,
  procedure: 'calibration',
  intervalMonths: 12,
  reason,
})

const instruments: readonly NewRule[] = [
  calibrated('wattmeter', 'Every figure in watts stands on it.'),
  calibrated('multimeter', 'Voltages and cut-offs stand on it.'),
  calibrated('clamp-meter', 'Currents stand on it.'),
  calibrated('thermometer', 'Heat tests stand on it; ice and boiling water are a good check.'),
  calibrated('battery-tester', 'Capacities stand on it.'),
  calibrated(
    'analyzer',
    'Sweeps stand on it; the calibration of each session does not replace the comparison.',
  ),
]

const kits: readonly NewRule[] = [
  {
    ...common,
    category: 'kit',
    procedure: 'count',
    intervalMonths: 6,
    reason: 'Parts are borrowed. A count follows every opening too.',
  },
  {
    ...common,
    category: 'computer',
    procedure: 'boot-and-update',
    intervalMonths: 1,
    warningDays: 7,
    limits: { voiceOnlyAfterMonths: 3 },
    reason: 'A computer that slept for months updates for an hour when it is needed.',
  },
]

export const DEFAULT_POLICY: {
  readonly name: string
  readonly reason: string
  readonly settings: PolicySettings
  readonly rules: readonly NewRule[]
} = {
  name: 'First policy',
  reason: 'What every group begins with. Edit it to fit your equipment and your own record.',
  settings: {},
  rules: [...transmitChain, ...batteries, ...instruments, ...kits],
}
