import type { BodyOf } from '#shared/contracts/endpoint.ts'
import type { doWhatIf as contract, WhatIfDone } from '#shared/contracts/what-if.ts'
import { changedKits } from '#shared/engine/advice/doable-steps.ts'
import { AppError } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { lockKits } from '../lock-kits.ts'
import { lockNewId } from '../registry/locks.ts'
import { prepareRewriting, type KitChange } from '../rewrite-readiness.ts'
import { concernedKits, idsIn, readQuestion, type Question } from './what-if-question.ts'
import { insertWhatIf, readWhatIf, sameWhatIf } from './what-if-rows.ts'
import { writeBacks, writeMoves, writeRisks } from './what-if-writes.ts'

type Body = BodyOf<typeof contract>

const LOCK_ITEMS: Statement = {
  name: 'lock-what-if-items',
  text: 'SELECT id FROM item WHERE group_id = $1 AND id = ANY($2::uuid[]) ORDER BY id FOR UPDATE',
}

/**
 * Does what can be done of a what-if in one transaction, all of it or nothing, on exactly the states that were looked
 * at: kits and items are locked in the order in which every other change takes them, then what the answer rested on is
 * read again. What waits for the world stays as notes, in the history of its kits too.
 */
export async function doWhatIf(
  tx: GroupTx,
  { whatIfId, body }: { whatIfId: string; body: Body },
): Promise<WhatIfDone> {
  await lockNewId(tx, whatIfId)
  const known = await sameWhatIf(tx, whatIfId, body)
  if (known) return known
  const question = await lockedQuestion(tx, body)
  await writeMoves(tx, question, body)
  await writeBacks(tx, question)
  await writeRisks(tx, question)
  const rewriting = await prepareRewriting(tx, changedKits(question.before, question.atOnce))
  await rewriting.write()
  await insertWhatIf(tx, { id: whatIfId, body, ...outcomeOf(question, rewriting.changes) })
  await auditWhatIf(tx, whatIfId, { question, reason: body.reason })
  return (await readWhatIf(tx, whatIfId))!
}

async function lockedQuestion(tx: GroupTx, { steps, basis }: Body): Promise<Question> {
  const ids = idsIn(steps)
  await lockKits(tx, await concernedKits(tx, ids))
  await tx.sql(LOCK_ITEMS, [tx.groupId, ids])
  const question = await readQuestion(tx, steps)
  if (basis === null || question.basis === basis) return question
  throw new AppError(
    'state-conflict',
    'Something of this changed since you looked. Nothing was done: look at the new answer first.',
  )
}

function outcomeOf(
  { told }: Question,
  changes: readonly KitChange[],
): Pick<WhatIfDone, 'done' | 'notes' | 'kits'> {
  return {
    done: told.flatMap(({ text, waits }) => (waits === null ? [text] : [])),
    notes: told.flatMap(({ text, waits }) => (waits === null ? [] : [{ text, waits }])),
    kits: changes.map(({ kitId, designation, before, after }) => ({
      kitId,
      designation,
      before: before?.verdict ?? after.verdict,
      after: after.verdict,
    })),
  }
}

interface Asked {
  readonly question: Question
  readonly reason: string
}

/** One entry for the whole, and one on every kit for each thing that is left to do. */
async function auditWhatIf(tx: GroupTx, id: string, { question, reason }: Asked): Promise<void> {
  const done = question.told.filter(({ waits }) => waits === null)
  const changes = done.length === 1 ? '1 change' : `${done.length} changes`
  const summary = `did a what-if of ${changes}: ${reason}`
  await record(tx, { action: 'what-if-done', subjectType: 'what-if', subjectId: id, summary })
  for (const { text, waits, kitIds } of question.told) {
    if (waits === null) continue
    for (const kitId of kitIds) {
      const note = `noted to do: ${text} (${reason})`
      await record(tx, {
        action: 'what-if-noted',
        subjectType: 'kit',
        subjectId: kitId,
        kitId,
        summary: note,
      })
    }
  }
}
