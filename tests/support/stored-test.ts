import type { StoredTest } from '#shared/contracts/test-shapes.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { judgeTest, type KnownForTest, type Performance } from '#shared/engine/procedures/judge-test.ts'

/** What a test is known with unless a case says otherwise. */
const NOTHING_KNOWN: KnownForTest = {
  rule: undefined,
  instrument: null,
  battery: {},
  feedline: { baselineDb: {}, last: [] },
  line: {},
  transformer: {},
  sweep: { baseline: null },
  region: 'itu-2',
  plan: { positions: [], sealNumber: null },
  references: [],
}

/** A test as it is answered, judged by the engine from its inputs. */
export function storedTest(
  performance: Performance,
  known: Partial<KnownForTest> = {},
  more: Partial<StoredTest> = {},
): StoredTest {
  const judgement = judgeTest(performance, { ...NOTHING_KNOWN, ...known })
  if (isFailure(judgement)) throw new Error(judgement.message)
  return {
    id: '019a0000-0000-7000-8000-000000000001',
    procedure: performance.procedure,
    subject: {
      type: 'item',
      id: '019a0000-0000-7000-8000-000000000002',
      designation: 'XFM-07',
      category: null,
    },
    performedAt: '2026-06-13T19:00:00.000Z',
    performedOn: '2026-06-13',
    recordedAt: '2026-06-13T19:20:00.000Z',
    method: 'As usual',
    instrument: null,
    finding: judgement.finding,
    findings: judgement.findings.map((one) => ({ ...one })) as StoredTest['findings'],
    supersededById: null,
    instrumentNote: '',
    operator: { id: 'a', name: 'A' },
    recordedBy: { id: 'a', name: 'A' },
    claimedAt: null,
    claimedAhead: false,
    inputs: { ...performance.inputs } as Record<string, unknown>,
    results: { ...judgement.results, warnings: judgement.warnings },
    judgedBy: {
      policyId: 'p',
      policyNumber: 1,
      policyName: 'First policy',
      bandRegion: 'itu-2',
      rule: null,
    },
    engineVersion: '1',
    notes: '',
    supersedes: null,
    supersededBy: null,
    attachments: [],
    effects: [],
    proposedRecalls: [],
    ...more,
  }
}
