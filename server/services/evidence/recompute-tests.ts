import { isFailure } from '#shared/engine/outcome.ts'
import { filesWanted, judgePerformance } from '#shared/engine/procedures/judge-performance.ts'
import type { KnownForTest, Performance } from '#shared/engine/procedures/performance.ts'
import type { FileSources } from '#shared/engine/procedures/test-files.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { knownAgain, type KeptKnown } from './kept-known.ts'
import { fileSources } from './named-files.ts'

/** A stored result that today's engine would give otherwise. */
export interface Difference {
  readonly testId: string
  readonly procedure: string
  readonly performedOn: string
  readonly engineVersion: string
  /** `finding`, `findings.0.value`, `results.worst.1.swr`; with what is stored and what is derived. */
  readonly faults: readonly { readonly path: string; readonly stored: unknown; readonly derived: unknown }[]
}

export interface Recomputed {
  readonly tests: number
  /** Stored before what they were judged with was kept: they cannot be derived again. */
  readonly without: number
  readonly differences: readonly Difference[]
}

interface TestRow {
  [column: string]: unknown
  id: string
  procedure: string
  performed_on: string
  engine_version: string
  inputs: unknown
  results: Record<string, unknown>
  findings: unknown
  finding: string
  known: KeptKnown | null
  limits: Record<string, unknown> | null
}

const PAGE = 500

const NEXT: Statement = {
  name: 'tests-to-recompute',
  text: `SELECT t.id, t.procedure, t.performed_on::text, t.engine_version, t.inputs, t.results, t.findings, t.finding,
      t.known, r.limits
    FROM test t LEFT JOIN rule r ON r.id = t.rule_id
    WHERE t.group_id = $1 AND t.id > $2 ORDER BY t.id LIMIT ${PAGE}`,
}
const FIRST_ID = '00000000-0000-0000-0000-000000000000'

/** Derives every stored test of the group again from its inputs, its files and what it was judged with. Changes nothing. */
export async function recomputeTests(tx: GroupTx): Promise<Recomputed> {
  const differences: Difference[] = []
  let [tests, without, after] = [0, 0, FIRST_ID]
  for (;;) {
    const rows = await tx.sql<TestRow>(NEXT, [tx.groupId, after])
    for (const row of rows) {
      if (row.known === null) without += 1
      else differences.push(...differencesOf(row, await derive(tx, row, row.known)))
    }
    tests += rows.length
    if (rows.length < PAGE) return { tests, without, differences }
    after = rows.at(-1)?.id ?? after
  }
}

/** What is stored of a judgement, as JSON carries it. */
interface Stored {
  readonly finding: unknown
  readonly findings: unknown
  readonly results: unknown
}

async function derive(tx: GroupTx, row: TestRow, kept: KeptKnown): Promise<Stored> {
  const performance = { procedure: row.procedure, inputs: row.inputs } as Performance
  const known = knownAgain(kept, row.limits ? { limits: row.limits } : undefined)
  const judgement = judgePerformance(performance, await sourcesOf(tx, performance, known), known)
  if (isFailure(judgement)) return { finding: judgement.message, findings: null, results: null }
  const { finding, findings, results, warnings } = judgement
  return JSON.parse(JSON.stringify({ finding, findings, results: { ...results, warnings } })) as Stored
}

function sourcesOf(tx: GroupTx, performance: Performance, known: KnownForTest): Promise<FileSources> {
  return fileSources(tx, filesWanted(performance, known))
}

function differencesOf(row: TestRow, derived: Stored): Difference[] {
  const { finding, findings, results } = row
  const faults = compare({ finding, findings, results }, derived, '')
  if (faults.length === 0) return []
  const { id: testId, procedure, performed_on: performedOn, engine_version: engineVersion } = row
  return [{ testId, procedure, performedOn, engineVersion, faults }]
}

/** Every leaf that differs; a part that only one side has is one fault. */
function compare(stored: unknown, derived: unknown, path: string): Difference['faults'] {
  if (Object.is(stored, derived)) return []
  if (!isBranch(stored) || !isBranch(derived)) return [{ path, stored, derived }]
  const names = new Set([...Object.keys(stored), ...Object.keys(derived)])
  return [...names].flatMap((name) =>
    compare(stored[name], derived[name], path === '' ? name : `${path}.${name}`),
  )
}

function isBranch(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null
}
