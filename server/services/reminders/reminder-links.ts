import type { Actor } from '../../caller.ts'
import type { AppContext } from '../../context.ts'
import { AppError } from '../../errors.ts'
import { inGroup, type GroupTx, type Statement } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { readReminderToken } from './reminder-token.ts'

export interface ReminderChoice {
  readonly memberName: string
  readonly groupName: string
  readonly wantsReminders: boolean
}

const READ: Statement = {
  name: 'read-reminder-choice',
  text: `SELECT m.name AS "memberName", g.name AS "groupName", m.wants_reminders AS "wantsReminders"
    FROM member m JOIN groups g ON g.id = m.group_id
    WHERE m.group_id = $1 AND m.id = $2 AND m.removed_at IS NULL`,
}
const CHANGE: Statement = {
  name: 'change-reminder-choice',
  text: `UPDATE member SET wants_reminders = $3, version = version + 1
    WHERE group_id = $1 AND id = $2 AND wants_reminders <> $3 RETURNING id`,
}

/** What a link says today. @throws AppError `link-invalid` */
export function readReminderChoice(ctx: AppContext, actor: Actor, token: string): Promise<ReminderChoice> {
  return withOwner(ctx, actor, token, readChoice)
}

/** Starts or stops the reminders; repeating it changes nothing more. @throws AppError `link-invalid` */
export function changeReminderChoice(
  ctx: AppContext,
  actor: Actor,
  { token, wantsReminders }: { token: string; wantsReminders: boolean },
): Promise<ReminderChoice> {
  return withOwner(ctx, actor, token, async (tx, memberId) => {
    const choice = await readChoice(tx, memberId)
    const [changed] = await tx.sql(CHANGE, [tx.groupId, memberId, wantsReminders])
    if (!changed) return choice
    const summary = `${wantsReminders ? 'started' : 'stopped'} reminders for ${choice.memberName} by the link in a mail`
    await record(tx, { action: 'reminders-changed', subjectType: 'member', subjectId: memberId, summary })
    return { ...choice, wantsReminders }
  })
}

function withOwner<T>(
  ctx: AppContext,
  actor: Actor,
  token: string,
  work: (tx: GroupTx, memberId: string) => Promise<T>,
): Promise<T> {
  const owner = readReminderToken(ctx.config.sessionSecret, token)
  if (!owner) throw invalid()
  return inGroup(ctx, { groupId: owner.groupId, actor }, (tx) => work(tx, owner.memberId))
}

async function readChoice(tx: GroupTx, memberId: string): Promise<ReminderChoice> {
  const [row] = await tx.sql<ReminderChoice & Record<string, unknown>>(READ, [tx.groupId, memberId])
  if (!row) throw invalid()
  return row
}

function invalid(): AppError {
  return new AppError(
    'link-invalid',
    'Use the link of a newer reminder, or change it on your own page after signing in.',
  )
}
