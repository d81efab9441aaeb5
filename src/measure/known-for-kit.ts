import type { KnownForTest } from '#shared/engine/procedures/judge-test.ts'

type Plan = KnownForTest['plan']

/** What the engine knows for a test of a whole kit: its load plan and its seal; of instruments and files nothing. */
export function knownForKit(plan: Plan): KnownForTest {
  return {
    rule: undefined,
    instrument: null,
    battery: {},
    feedline: { baselineDb: {}, last: [] },
    line: {},
    transformer: {},
    sweep: { baseline: null },
    references: [],
    region: 'itu-2',
    plan,
  }
}
