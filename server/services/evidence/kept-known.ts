import { DEFAULT_REGION } from '#shared/engine/procedures/judged-bands.ts'
import type { KnownForTest } from '#shared/engine/procedures/performance.ts'
import type { Procedure } from '#shared/engine/vocabulary.ts'

/** The rule is kept by its id. */
export type KeptKnown = Partial<Omit<KnownForTest, 'rule'>>

/** What each procedure's judgement looks at. */
const USED: Readonly<Record<Procedure, readonly (keyof KeptKnown)[]>> = {
  'heat-test': ['instrument', 'transformer'],
  'pair-loss': ['instrument', 'region'],
  'open-short-load': ['instrument', 'transformer', 'region'],
  'antenna-sweep': ['instrument', 'sweep', 'region'],
  'feedline-loss': ['instrument', 'feedline', 'line', 'region'],
  'battery-capacity': ['instrument', 'battery'],
  'radio-check': ['instrument'],
  inspection: [],
  count: ['plan'],
  calibration: [],
  'session-check': ['references'],
  'boot-and-update': [],
  'on-air-check': [],
}

const NOTHING: Required<KeptKnown> = {
  instrument: null,
  battery: {},
  feedline: { baselineDb: {}, last: [] },
  line: {},
  transformer: {},
  sweep: { baseline: null },
  references: [],
  region: DEFAULT_REGION,
  plan: { positions: [], sealNumber: null },
}

/** The part of what was known that is kept with a test: records of today may say something else tomorrow. */
export function keptKnown(procedure: Procedure, known: KnownForTest): KeptKnown {
  return Object.fromEntries(USED[procedure].map((name) => [name, known[name]]))
}

/** What was known again, with the rule that the test names. */
export function knownAgain(kept: KeptKnown, rule: KnownForTest['rule']): KnownForTest {
  return { ...NOTHING, ...kept, rule }
}
