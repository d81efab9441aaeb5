/**
 * The temperature a transformer may reach: core, wire and enclosure, the lowest governs.
 * Curie minimums and wire parts: manufacturers' generic tables and the standards' titles, from memory,
 * verify, except where a source says confirmed. The margins and the enclosure's 85 deg C are our choice.
 */
import { checkNumber, failure, type Failure, type Outcome } from './outcome.ts'

export interface FerriteMix {
  readonly curieMinimumC: number
  readonly family: 'MnZn' | 'NiZn'
}

export const FERRITE_MIXES = {
  '31': { curieMinimumC: 130, family: 'MnZn' },
  '43': { curieMinimumC: 130, family: 'NiZn' },
  '52': { curieMinimumC: 250, family: 'NiZn' },
  '61': { curieMinimumC: 300, family: 'NiZn' },
  '77': { curieMinimumC: 200, family: 'MnZn' },
} as const satisfies Record<string, FerriteMix>

export interface WindingWire {
  readonly name: string
  /** Temperature class, deg C: the lowest of those sold where the marking decides. */
  readonly classC: number
  /** Other classes under the same name; enter the marked one. */
  readonly alsoSoldC?: readonly number[]
  readonly standard: string
}

export const WINDING_WIRES = {
  'polyvinyl-acetal': {
    name: 'polyvinyl acetal',
    classC: 120,
    alsoSoldC: [105],
    standard: 'IEC 60317-12; NEMA MW 15-C (105 there)',
  },
  'polyurethane-155': {
    name: 'solderable polyurethane 155',
    classC: 155,
    standard: 'IEC 60317-20 (confirmed); NEMA MW 79-C',
  },
  'polyurethane-180': {
    name: 'solderable polyurethane 180',
    classC: 180,
    standard: 'IEC 60317-51; NEMA MW 82-C',
  },
  polyesterimide: { name: 'polyesterimide', classC: 180, standard: 'IEC 60317-8; NEMA MW 30-C' },
  'polyamide-imide': {
    name: 'polyester or polyesterimide with polyamide-imide',
    classC: 200,
    standard: 'IEC 60317-13; NEMA MW 35-C',
  },
  polyimide: { name: 'polyimide', classC: 220, alsoSoldC: [240], standard: 'IEC 60317-7, -46; NEMA MW 16-C' },
  pvc: {
    name: 'PVC-covered hookup wire',
    classC: 80,
    alsoSoldC: [90, 105],
    standard: 'as marked; common practice, no source',
  },
  ptfe: {
    name: 'PTFE-covered hookup wire',
    classC: 200,
    alsoSoldC: [260],
    standard: 'as marked; common practice, no source',
  },
} as const satisfies Record<string, WindingWire>

export type FerriteMixId = keyof typeof FERRITE_MIXES
export type WindingWireId = keyof typeof WINDING_WIRES

export const BELOW_CURIE_K = 25
export const BELOW_WIRE_CLASS_K = 20
export const DEFAULT_ENCLOSURE_C = 85

export interface HeatLimit {
  readonly limitC: number
  readonly governedBy: 'core' | 'wire' | 'enclosure'
}

/**
 * Default limit, deg C: the lowest of Curie minimum - 25 K, wire class - 20 K and the enclosure (85, or the
 * figure a person enters, 0 to 500). `wireClassC` (50 to 500) is the class marked on the reel.
 * `E_RANGE` for an unknown mix or wire, or a figure out of range.
 */
export function defaultHeatLimit(build: {
  mix: FerriteMixId
  wire: WindingWireId
  wireClassC?: number
  enclosureC?: number
}): Outcome<HeatLimit> {
  const { mix, wire, enclosureC = DEFAULT_ENCLOSURE_C } = build
  const bad = checkKnown('mix', mix, FERRITE_MIXES) ?? checkKnown('wire', wire, WINDING_WIRES)
  if (bad) return bad
  const { wireClassC = WINDING_WIRES[wire].classC } = build
  const badFigure =
    checkNumber('wireClassC', wireClassC, 50, 500) ?? checkNumber('enclosureC', enclosureC, 0, 500)
  if (badFigure) return badFigure
  const candidates: HeatLimit[] = [
    { limitC: enclosureC, governedBy: 'enclosure' },
    { limitC: FERRITE_MIXES[mix].curieMinimumC - BELOW_CURIE_K, governedBy: 'core' },
    { limitC: wireClassC - BELOW_WIRE_CLASS_K, governedBy: 'wire' },
  ]
  return candidates.reduce((lowest, next) => (next.limitC < lowest.limitC ? next : lowest))
}

function checkKnown(field: string, id: unknown, table: object): Failure | undefined {
  if (typeof id === 'string' && Object.hasOwn(table, id)) return undefined
  return failure('E_RANGE', `${field} must be one of ${Object.keys(table).join(', ')}.`, { field })
}
