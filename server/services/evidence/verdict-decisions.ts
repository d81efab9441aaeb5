import type { z } from 'zod'
import type { decideVerdict as contract, verdictDecision } from '#shared/contracts/verdict-decisions.ts'
import { verdictWords } from '#shared/engine/readiness/effect-sentences.ts'
import { AppError, invalidField, notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { sameContent } from '../registry/changes.ts'
import { idTaken, namingDuplicates } from '../registry/duplicates.ts'
import { lockNewId } from '../registry/locks.ts'
import { rewriteReadiness } from '../rewrite-readiness.ts'
import { readKitSubject } from './test-subject.ts'

export type DecisionAnswer = z.output<typeof verdictDecision>
type Body = z.output<typeof contract.body>

interface DecisionRow {
  [column: string]: unknown
  id: string
  kit_id: string
  kind: DecisionAnswer['kind']
  to_verdict: DecisionAnswer['toVerdict']
  reason: string
  from_at: Date
  until_at: Date | null
  decided_by: string
  withdrawn_at: Date | null
}

const SELECT = `SELECT d.id, d.kit_id, d.kind, d.to_verdict, d.reason, d.from_at, d.until_at, m.name AS decided_by,
    d.withdrawn_at
  FROM verdict_decision d JOIN member m ON m.id = d.decided_by`
const READ: Statement = {
  name: 'read-decision',
  text: `${SELECT} WHERE d.group_id = $1 AND d.id = $2`,
}
const OF_KIT: Statement = {
  name: 'decisions-of-kit',
  text: `${SELECT} WHERE d.kit_id = $1 AND d.withdrawn_at IS NULL AND (d.until_at IS NULL OR d.until_at > $2)
    ORDER BY d.from_at, d.id`,
}
const INSERT: Statement = {
  name: 'insert-decision',
  text: `INSERT INTO verdict_decision (id, group_id, kit_id, kind, to_verdict, reason, from_at, until_at, decided_by)
    VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9)`,
}
const WITHDRAW: Statement = {
  name: 'withdraw-decision',
  text: `UPDATE verdict_decision SET withdrawn_at = $3 WHERE id = $1 AND kit_id = $2 AND withdrawn_at IS NULL
    RETURNING id`,
}

/** Lowers a verdict or accepts a risk from now on. There is no way to raise one. */
export async function decideVerdict(
  tx: GroupTx,
  { kitId, decisionId, body }: { kitId: string; decisionId: string; body: Body },
): Promise<DecisionAnswer> {
  await lockNewId(tx, decisionId)
  const kit = await readKitSubject(tx, kitId)
  const [known] = await tx.sql<DecisionRow>(READ, [tx.groupId, decisionId])
  const toVerdict = body.kind === 'lowered' ? body.toVerdict : null
  const untilAt = body.untilAt === undefined ? null : new Date(body.untilAt)
  if (known) return sameAgain(known, { kitId, kind: body.kind, toVerdict, reason: body.reason, untilAt })
  if (untilAt && untilAt <= tx.now) throw invalidField('#/untilAt', 'Choose a time to come.')
  await insertDecision(tx, { id: decisionId, kit, kind: body.kind, toVerdict, reason: body.reason, untilAt })
  await rewriteReadiness(tx, [kitId])
  return readDecision(tx, decisionId)
}

interface NewDecision extends Pick<DecisionAnswer, 'id' | 'kind' | 'toVerdict' | 'reason'> {
  readonly kit: { readonly id: string; readonly designation: string }
  readonly untilAt: Date | null
}

/** The row and its entry in the history; the caller rewrites the kit. */
export async function insertDecision(
  tx: GroupTx,
  { id, kit, kind, toVerdict, reason, untilAt }: NewDecision,
): Promise<void> {
  const values = [id, tx.groupId, kit.id, kind, toVerdict, reason, tx.now, untilAt, tx.actor.memberId]
  await namingDuplicates(() => tx.sql(INSERT, values))
  const what = toVerdict
    ? `lowered ${kit.designation} to ${verdictWords(toVerdict)}`
    : `accepted a risk for ${kit.designation}`
  await auditDecision(tx, kit.id, { action: 'verdict-decided', summary: `${what}: ${reason}` })
}

function sameAgain(
  known: DecisionRow,
  sent: Pick<DecisionAnswer, 'kitId' | 'kind' | 'toVerdict' | 'reason'> & { untilAt: Date | null },
): DecisionAnswer {
  const { kit_id: kitId, kind, to_verdict: toVerdict, reason, until_at: untilAt } = known
  if (sameContent({ kitId, kind, toVerdict, reason, untilAt }, sent)) return decisionOf(known)
  throw idTaken()
}

export async function withdrawDecision(
  tx: GroupTx,
  { kitId, decisionId, reason }: { kitId: string; decisionId: string; reason: string },
): Promise<DecisionAnswer> {
  const kit = await readKitSubject(tx, kitId)
  const decision = await readDecision(tx, decisionId)
  if (decision.kitId !== kitId) throw notFound('decision')
  const [withdrawn] = await tx.sql(WITHDRAW, [decisionId, kitId, tx.now])
  if (!withdrawn) throw new AppError('state-conflict', 'This decision was taken back before.')
  const what = decision.kind === 'lowered' ? 'the lowered verdict' : 'the accepted risk'
  const summary = `took back ${what} of ${kit.designation}: ${reason}`
  await auditDecision(tx, kitId, { action: 'decision-withdrawn', summary })
  await rewriteReadiness(tx, [kitId])
  return readDecision(tx, decisionId)
}

/** Those that hold at the instant or will. */
export async function decisionsOfKit(tx: GroupTx, kitId: string, at: Date): Promise<DecisionAnswer[]> {
  return (await tx.sql<DecisionRow>(OF_KIT, [kitId, at])).map(decisionOf)
}

async function readDecision(tx: GroupTx, decisionId: string): Promise<DecisionAnswer> {
  const [row] = await tx.sql<DecisionRow>(READ, [tx.groupId, decisionId])
  if (!row) throw notFound('decision')
  return decisionOf(row)
}

function auditDecision(
  tx: GroupTx,
  kitId: string,
  entry: { action: string; summary: string },
): Promise<void> {
  return record(tx, { subjectType: 'kit', subjectId: kitId, kitId, ...entry })
}

function decisionOf(row: DecisionRow): DecisionAnswer {
  return {
    id: row.id,
    kitId: row.kit_id,
    kind: row.kind,
    toVerdict: row.to_verdict,
    reason: row.reason,
    fromAt: row.from_at.toISOString(),
    untilAt: row.until_at?.toISOString() ?? null,
    decidedBy: row.decided_by,
    withdrawnAt: row.withdrawn_at?.toISOString() ?? null,
  }
}
