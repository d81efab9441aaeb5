import type { z } from 'zod'
import type { raiseCheck as contract } from '#shared/contracts/raised-checks.ts'
import { dayText, withArticle } from '#shared/engine/readiness/words.ts'
import { canBeTested, SUBJECTS } from '#shared/engine/procedures/subjects.ts'
import { invalidField } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { sameContent } from '../registry/changes.ts'
import { idTaken, namingDuplicates } from '../registry/duplicates.ts'
import { lockNewId } from '../registry/locks.ts'
import { rewriteReadiness } from '../rewrite-readiness.ts'
import { readRaisedCheck, readRaisedChecks, type RaisedCheckAnswer } from './raised-check-rows.ts'
import { readItemSubject, readKitSubject, type TestSubject } from './test-subject.ts'

type Body = z.output<typeof contract.body>

const INSERT: Statement = {
  name: 'insert-raised-check',
  text: `INSERT INTO raised_check (id, group_id, procedure, item_id, kit_id, band, cause, reason, doubts_earlier, raised_at,
      due_on, raised_by)
    VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11, $12)`,
}

/** Asks for a check because something happened, and rewrites the kit that it is about. */
export async function raiseCheck(
  tx: GroupTx,
  { checkId, body }: { checkId: string; body: Body },
): Promise<RaisedCheckAnswer> {
  await lockNewId(tx, checkId)
  const [known] = await readRaisedChecks(tx, [checkId])
  if (known) return sameAgain(known, body)
  const subject = await subjectOf(tx, body)
  await namingDuplicates(() => insertRaisedCheck(tx, { ...body, id: checkId, subject }))
  if (subject.kitId !== null) await rewriteReadiness(tx, [subject.kitId])
  return readRaisedCheck(tx, checkId)
}

/** The same request sent again gets the same answer, also when the check was withdrawn meanwhile. */
function sameAgain(known: RaisedCheckAnswer, body: Body): RaisedCheckAnswer {
  const { procedure, cause, reason, doubtsEarlier, dueOn, itemId = null, kitId = null, band = null } = body
  const sent = { procedure, cause, reason, doubtsEarlier, dueOn, itemId, kitId, band }
  if (sameContent({ ...known, ...sent }, known)) return known
  throw idTaken()
}

async function subjectOf(tx: GroupTx, { itemId, kitId, procedure }: Body): Promise<TestSubject> {
  if (kitId !== undefined) {
    const kit = await readKitSubject(tx, kitId)
    if (SUBJECTS[procedure] === 'kit' || procedure === 'inspection') return kit
    throw invalidField('#/procedure', 'This procedure is done to an item, not to a kit.')
  }
  const item = await readItemSubject(tx, itemId ?? '')
  if (item.category !== 'kit' && canBeTested(item.category, procedure)) return item
  throw invalidField('#/procedure', `This procedure is not done to ${withArticle(item.category)}.`)
}

export interface NewRaisedCheck extends Pick<
  Body,
  'procedure' | 'cause' | 'reason' | 'doubtsEarlier' | 'dueOn'
> {
  readonly id: string
  readonly band?: Body['band']
  readonly subject: Pick<TestSubject, 'type' | 'id' | 'designation' | 'kitId'>
}

/** The row and its entry in the history; the caller rewrites the kits. */
export async function insertRaisedCheck(tx: GroupTx, check: NewRaisedCheck): Promise<void> {
  const { id, subject, procedure, band, cause, reason, doubtsEarlier, dueOn } = check
  const ids = subject.type === 'item' ? [subject.id, null] : [null, subject.id]
  await tx.sql(INSERT, [
    ...[id, tx.groupId, procedure, ...ids, band ?? null, cause, reason, doubtsEarlier],
    ...[tx.now, dueOn, tx.actor.memberId],
  ])
  const name = `${procedure.replaceAll('-', ' ')}${band ? ` on ${band}` : ''}`
  await record(tx, {
    action: 'check-asked-for',
    subjectType: subject.type,
    subjectId: subject.id,
    kitId: subject.kitId,
    summary: `asked for ${withArticle(name)} of ${subject.designation} by ${dayText(dueOn)}: ${reason}`,
  })
}
