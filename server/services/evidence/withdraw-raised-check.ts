import { AppError } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { rewriteReadiness } from '../rewrite-readiness.ts'
import { readRaisedCheck, type RaisedCheckAnswer } from './raised-check-rows.ts'
import { readItemSubject, readKitSubject } from './test-subject.ts'

const WITHDRAW: Statement = {
  name: 'withdraw-raised-check',
  text: 'UPDATE raised_check SET withdrawn_at = $2 WHERE id = $1 AND withdrawn_at IS NULL RETURNING id',
}

/** Takes a raised check back: what it asked for or doubted stands as before. */
export async function withdrawRaisedCheck(
  tx: GroupTx,
  { checkId, reason }: { checkId: string; reason: string },
): Promise<RaisedCheckAnswer> {
  const check = await readRaisedCheck(tx, checkId)
  const [withdrawn] = await tx.sql(WITHDRAW, [checkId, tx.now])
  if (!withdrawn) throw new AppError('state-conflict', 'This check was taken back before.')
  const { itemId, kitId } = check
  const subject = itemId === null ? await readKitSubject(tx, kitId ?? '') : await readItemSubject(tx, itemId)
  await record(tx, {
    action: 'check-withdrawn',
    subjectType: subject.type,
    subjectId: subject.id,
    kitId: subject.kitId,
    summary: `took back the ${check.procedure.replaceAll('-', ' ')} asked of ${subject.designation}: ${reason}`,
  })
  if (subject.kitId !== null) await rewriteReadiness(tx, [subject.kitId])
  return readRaisedCheck(tx, checkId)
}
