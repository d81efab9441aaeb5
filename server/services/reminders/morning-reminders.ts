import type { DueCheck } from '#shared/contracts/due-checks.ts'
import { systemActor } from '../../caller.ts'
import type { AppContext } from '../../context.ts'
import { inGroup, type GroupTx, type Statement } from '../../group-transaction.ts'
import { listGroups } from '../list-groups.ts'
import { dueChecksOf } from '../readiness/due-checks.ts'
import { queueMail } from '../queue-mail.ts'
import { outlooks, type Outlook } from './outlook.ts'
import { recipientsOf, type Recipient } from './recipients.ts'
import { reminderMail, type ReminderKit } from './reminder-mail.ts'
import { makeReminderToken } from './reminder-token.ts'

/** Reminders go out from this hour on in the group's own zone, once a local day. */
const MORNING_HOUR = 7
const LOOSE = 'Not in a kit'

const BEGIN_RUN: Statement = {
  name: 'begin-reminder-run',
  text: `INSERT INTO reminder_run (group_id, on_day, made_at) VALUES ($1, $2, $3)
    ON CONFLICT DO NOTHING RETURNING on_day`,
}
const NOTE_REMINDER: Statement = {
  name: 'note-reminder',
  text: 'INSERT INTO reminder (member_id, group_id, on_day, made_at, mail_id) VALUES ($1, $2, $3, $4, $5)',
}
const GROUP_NAME: Statement = { name: 'reminder-group-name', text: 'SELECT name FROM groups WHERE id = $1' }

/** Makes today's reminders in every group whose morning has come. A morning missed while nothing ran is made up once. */
export async function remindAllGroups(ctx: AppContext): Promise<void> {
  for (const { id: groupId, time_zone: zone } of await listGroups(ctx)) {
    if (localHour(ctx.clock.now(), zone) < MORNING_HOUR) continue
    await inGroup(ctx, { groupId, actor: systemActor('morning-reminders') }, (tx) => remindGroup(ctx, tx))
  }
}

/**
 * One transaction a group: the run of the day is claimed by its row, so two servers make the mails once, and a crash
 * in between leaves neither the claim nor half of the mails.
 */
export async function remindGroup(ctx: AppContext, tx: GroupTx): Promise<void> {
  const today = await tx.today()
  const [claimed] = await tx.sql(BEGIN_RUN, [tx.groupId, today, tx.now])
  if (!claimed) return
  const recipients = await recipientsOf(tx, today)
  if (recipients.length === 0) return
  const checks = await dueChecksOf(tx)
  const kits = await outlooks(tx)
  const [group] = await tx.sql<{ name: string }>(GROUP_NAME, [tx.groupId])
  for (const recipient of recipients) {
    const own = checks.filter((check) => isFor(recipient, check))
    if (own.length === 0) continue
    const mailId = await mailReminder(ctx, tx, { recipient, checks: own, kits, groupName: group!.name })
    await tx.sql(NOTE_REMINDER, [recipient.memberId, tx.groupId, today, tx.now, mailId])
  }
}

function isFor({ scope, kitIds }: Recipient, { subject, kit, state }: DueCheck): boolean {
  if (state !== 'overdue' && state !== 'due-soon') return false
  if (scope === 'group') return true
  const kitId = subject.type === 'kit' ? subject.id : kit?.id
  return kitId !== undefined && kitIds.has(kitId)
}

interface ReminderParts {
  readonly recipient: Recipient
  readonly checks: readonly DueCheck[]
  readonly kits: ReadonlyMap<string, Outlook>
  readonly groupName: string
}

async function mailReminder(ctx: AppContext, tx: GroupTx, parts: ReminderParts): Promise<string> {
  const { recipient, checks, kits, groupName } = parts
  const token = makeReminderToken(ctx.config.sessionSecret, {
    groupId: tx.groupId,
    memberId: recipient.memberId,
  })
  const { publicUrl } = ctx.config
  const mail = reminderMail({
    memberName: recipient.name,
    groupName,
    scope: recipient.scope,
    overdue: byKit(checks.filter(isPastDue), kits),
    coming: byKit(
      checks.filter((check) => !isPastDue(check)),
      kits,
    ),
    publicUrl,
    changeLink: `${publicUrl}/reminders/${token}`,
  })
  const headers = {
    'List-Unsubscribe': `<${publicUrl}/api/v1/reminder-links/${token}/stop>`,
    'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click',
  }
  return queueMail(tx, { memberId: recipient.memberId, recipient: recipient.email, headers, ...mail })
}

function isPastDue({ state }: DueCheck): boolean {
  return state === 'overdue'
}

function byKit(checks: readonly DueCheck[], kits: ReadonlyMap<string, Outlook>): ReminderKit[] {
  const groups = new Map<string | null, DueCheck[]>()
  for (const check of checks) {
    const kitId = check.subject.type === 'kit' ? check.subject.id : (check.kit?.id ?? null)
    groups.set(kitId, [...(groups.get(kitId) ?? []), check])
  }
  return [...groups].map(([kitId, list]) => {
    const kit = kitId === null ? undefined : kits.get(kitId)
    return { kitId, heading: kit?.designation ?? LOOSE, outlook: kit?.text ?? '', checks: list }
  })
}

/** The hour of the day in a zone, 0 to 23. */
function localHour(at: Date, zone: string): number {
  const text = new Intl.DateTimeFormat('en-GB', { timeZone: zone, hour: '2-digit', hourCycle: 'h23' }).format(
    at,
  )
  return Number(text)
}
