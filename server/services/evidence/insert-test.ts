import { createHash } from 'node:crypto'
import type { RecordTestBody } from '#shared/contracts/record-test.ts'
import type { Judgement } from '#shared/engine/procedures/judgement.ts'
import { ENGINE_VERSION } from '#shared/engine/procedures/judge-test.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import type { KeptKnown } from './kept-known.ts'
import type { FileLink } from './named-files.ts'
import { alreadySuperseded } from './test-subject.ts'

export interface TestToInsert {
  readonly id: string
  readonly body: RecordTestBody
  readonly operatorId: string
  readonly performedOn: string
  /** When it counts as done: never after its receipt. */
  readonly performedAt: Date
  /** What the device said, where that lies after the receipt. */
  readonly claimedAt: Date | null
  readonly policyId: string
  readonly ruleId: string | null
  readonly judgement: Judgement
  /** What it was judged with besides the inputs. */
  readonly known: KeptKnown
  readonly files: readonly FileLink[]
  readonly contentHash: Buffer
}

const INSERT: Statement = {
  name: 'insert-test',
  text: `INSERT INTO test (id, group_id, procedure, item_id, kit_id, performed_at, performed_on, recorded_at,
      claimed_at, operator_id, recorded_by, method, instrument_id, instrument_note, inputs, results, findings,
      finding, policy_id, rule_id, engine_version, notes, supersedes_id, supersedes_reason, content_hash, known)
    VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11, $12, $13, $14, $15, $16, $17, $18, $19, $20, $21, $22, $23,
      $24, $25, $26)
    ON CONFLICT (id) DO NOTHING RETURNING id`,
}

/** False when the id is taken: by the same test sent before or at the same moment, or by another. */
export async function insertTest(tx: GroupTx, test: TestToInsert): Promise<boolean> {
  const { body, judgement } = test
  try {
    const rows = await tx.sql(INSERT, [
      test.id,
      tx.groupId,
      body.procedure,
      'itemId' in body ? body.itemId : null,
      'kitId' in body ? body.kitId : null,
      test.performedAt,
      test.performedOn,
      tx.now,
      test.claimedAt,
      test.operatorId,
      tx.actor.memberId ?? test.operatorId,
      body.method,
      body.instrumentId ?? null,
      body.instrumentNote,
      JSON.stringify(body.inputs),
      JSON.stringify({ ...judgement.results, warnings: judgement.warnings }),
      JSON.stringify(judgement.findings),
      judgement.finding,
      test.policyId,
      test.ruleId,
      ENGINE_VERSION,
      body.notes,
      body.supersedes?.testId ?? null,
      body.supersedes?.reason ?? null,
      test.contentHash,
      JSON.stringify(test.known),
    ])
    return rows.length === 1
  } catch (error) {
    if (isTakenTwice(error)) throw alreadySuperseded()
    throw error
  }
}

/** Two corrections of one test at the same moment: the unique key lets one through. */
function isTakenTwice(error: unknown): boolean {
  const { code, constraint } = error as { code?: string; constraint?: string }
  return code === '23505' && constraint === 'test_supersedes_id_key'
}

/** What makes two requests the same test: everything that was sent, in whatever order its fields came. */
export function contentHash(body: RecordTestBody, operatorId: string): Buffer {
  return createHash('sha256')
    .update(JSON.stringify(sorted({ ...body, operatorId })))
    .digest()
}

function sorted(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(sorted)
  if (typeof value !== 'object' || value === null) return value
  const entries = Object.entries(value).filter(([, inner]) => inner !== undefined)
  return Object.fromEntries(
    entries.sort(([a], [b]) => (a < b ? -1 : 1)).map(([key, inner]) => [key, sorted(inner)]),
  )
}
