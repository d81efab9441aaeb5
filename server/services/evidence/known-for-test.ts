import type { RecordTestBody } from '#shared/contracts/record-test.ts'
import type { Accuracy } from '#shared/engine/procedures/accuracy.ts'
import type { FeedlineReading } from '#shared/engine/procedures/feedline-loss.ts'
import type { KnownForTest } from '#shared/engine/procedures/judge-test.ts'
import type { Position, Rule } from '#shared/engine/readiness/types.ts'
import type { Chemistry } from '#shared/engine/vocabulary.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import type { TestSubject } from './test-subject.ts'

interface Parts {
  readonly body: RecordTestBody
  readonly performedAt: Date
  readonly subject: TestSubject
  readonly rule: Rule | undefined
  readonly accuracy: Accuracy | null
}

/** What the finding of a test depends on besides its inputs; reads only what the procedure asks for. */
export async function knownForTest(tx: GroupTx, { body, subject, ...parts }: Parts): Promise<KnownForTest> {
  const { ratedAh, chemistry } = subject.facts
  const { rule, accuracy, performedAt } = parts
  return {
    rule,
    instrument: accuracy,
    battery: {
      ...(ratedAh !== undefined && { ratedAh }),
      ...(chemistry !== undefined && { chemistry: chemistry as Chemistry }),
    },
    feedline:
      body.procedure === 'feedline-loss'
        ? await feedlineHistory(tx, subject, { ...body, performedAt })
        : { baselineDb: {}, last: [] },
    plan: body.procedure === 'count' ? await loadPlan(tx, body.kitId) : { positions: [], sealNumber: null },
  }
}

interface FeedlineRow {
  [column: string]: unknown
  inputs: { readings: FeedlineReading[]; setsBaseline: boolean }
}

// Corrected tests count no more, and a test that this one corrects is among them.
const FEEDLINE: Statement = {
  name: 'feedline-history',
  text: `SELECT t.inputs FROM test t
    WHERE t.item_id = $1 AND t.procedure = 'feedline-loss' AND t.performed_at < $2 AND t.id IS DISTINCT FROM $3
      AND NOT EXISTS (SELECT FROM test s WHERE s.supersedes_id = t.id)
    ORDER BY t.performed_at, t.id`,
}

type FeedlineTest = Extract<RecordTestBody, { procedure: 'feedline-loss' }>

/** The baseline of a band: of the newest test that set one, else as entered for the item, else the first test. */
async function feedlineHistory(
  tx: GroupTx,
  subject: TestSubject,
  {
    performedAt,
    supersedes,
    inputs: { readings },
  }: Omit<FeedlineTest, 'performedAt'> & { performedAt: Date },
): Promise<KnownForTest['feedline']> {
  const values = [subject.id, performedAt, supersedes?.testId ?? null]
  const rows = await tx.sql<FeedlineRow>(FEEDLINE, values)
  const entered = typeof subject.details.baselineDb === 'number' ? subject.details.baselineDb : undefined
  const known = readings.flatMap(({ band }) => {
    const lossesOf = (tests: readonly FeedlineRow[]) =>
      tests.flatMap(({ inputs }) => inputs.readings.filter((reading) => reading.band === band))
    const set = lossesOf(rows.filter(({ inputs }) => inputs.setsBaseline)).at(-1)?.lossDb
    const baselineDb = set ?? entered ?? lossesOf(rows)[0]?.lossDb
    return baselineDb === undefined ? [] : [[band, baselineDb] as const]
  })
  return { baselineDb: Object.fromEntries(known), last: rows.at(-1)?.inputs.readings ?? [] }
}

interface PlanRow extends Position {
  [column: string]: unknown
}

const PLAN: Statement = {
  name: 'count-plan',
  text: `SELECT p.id, p.name, p.category, p.quantity, p.vital FROM position p JOIN kit k ON k.kit_kind_id = p.kit_kind_id
    WHERE k.id = $1 AND p.removed_at IS NULL ORDER BY p.ordinal, p.id`,
}
const SEAL: Statement = { name: 'count-seal', text: 'SELECT seal_number FROM kit WHERE id = $1' }

async function loadPlan(tx: GroupTx, kitId: string): Promise<KnownForTest['plan']> {
  const [positions, [kit]] = await Promise.all([
    tx.sql<PlanRow>(PLAN, [kitId]),
    tx.sql<{ seal_number: string | null }>(SEAL, [kitId]),
  ])
  return { positions, sealNumber: kit?.seal_number ?? null }
}

const ACCURACY = [
  'accuracyPercentOfReading',
  'accuracyPercentOfFullScale',
  'accuracyAbsolute',
  'fullScale',
  'resolution',
] as const

/** An instrument's accuracy from its details; null without an instrument. */
export function accuracyOf(instrument: { details: Record<string, unknown> } | null): Accuracy | null {
  if (!instrument) return null
  const known = ACCURACY.filter((name) => typeof instrument.details[name] === 'number')
  return Object.fromEntries(known.map((name) => [name, instrument.details[name]]))
}
