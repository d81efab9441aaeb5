import type { KitPromise, Position } from '#shared/engine/readiness/types.ts'
import type { Category } from '#shared/engine/vocabulary.ts'

/** Kit kinds of the scenario, section 3. A position's id is its name. */
export interface Kind {
  readonly promise: KitPromise
  readonly positions: readonly Position[]
}

const SUPPORTING = ['mast', 'headset', 'solar panel', 'controller']

type Line = Category | readonly [name: string, category: Category, quantity?: number]

function plan(...lines: readonly Line[]): Position[] {
  return lines.map((line) => {
    const [name, category, quantity = 1] = typeof line === 'string' ? [line, line] : line
    return { id: name, name, category, quantity, vital: !SUPPORTING.includes(name) }
  })
}

const HF_POSITIONS: readonly Line[] = [
  'radio',
  'transformer',
  ['wire', 'antenna'],
  'feedline',
  'jumper',
  ['battery A', 'battery'],
  ['battery B', 'battery'],
  'charger',
  ['DC lead', 'dc-lead'],
  ['adapter pouch', 'adapter-pouch'],
  'mast',
]

export const HF_E: Kind = {
  promise: { bands: ['40 m', '20 m', '15 m', '10 m'], modes: ['voice'], watts: 100, hours: 12 },
  positions: plan(...HF_POSITIONS),
}

export const VU: Kind = {
  promise: { bands: ['2 m', '70 cm'], modes: ['voice'], watts: 50, hours: 12 },
  positions: plan(
    'radio',
    'antenna',
    'feedline',
    'battery',
    'charger',
    ['DC lead', 'dc-lead'],
    ['adapter pouch', 'adapter-pouch'],
    'mast',
    'headset',
  ),
}

export const DG: Kind = {
  promise: { bands: ['40 m', '20 m'], modes: ['digital', 'voice'], watts: 50, hours: 12 },
  positions: plan(...HF_POSITIONS, 'computer', 'interface'),
}

export const XB: Kind = {
  promise: { bands: ['2 m'], modes: ['relay'], watts: 50, hours: 12 },
  positions: plan(
    'radio',
    'filter',
    'antenna',
    'feedline',
    ['battery A', 'battery'],
    ['battery B', 'battery'],
    'charger',
    'mast',
    ['adapter pouch', 'adapter-pouch'],
  ),
}

export const PW: Kind = {
  promise: { bands: [], modes: [], watts: null, hours: null },
  positions: plan(
    ['batteries', 'battery', 4],
    'charger',
    ['solar panel', 'solar-panel'],
    ['controller', 'solar-controller'],
    ['distribution box', 'distribution-box'],
  ),
}

export const TB: Kind = {
  promise: { bands: [], modes: [], watts: null, hours: null },
  positions: plan(
    ['analyser', 'analyzer'],
    'wattmeter',
    ['dummy load', 'dummy-load'],
    'thermometer',
    ['battery tester', 'battery-tester'],
    'multimeter',
    ['cal kit', 'calibration-kit'],
    ['2450-ohm fixture', 'test-fixture'],
  ),
}
