import { systemActor } from '../caller.ts'
import type { AppContext } from '../context.ts'
import { inGroup, type GroupTx, type Statement } from '../group-transaction.ts'
import { poolOf } from '../pool.ts'
import type { MailTransport } from './mail-transport.ts'

/** A mail that is being sent belongs to one process for this long; after a crash another takes it up. */
const LEASE_SECONDS = 60
const LONGEST_PAUSE_SECONDS = 15 * 60
const GIVE_UP_AFTER_DAYS = 3
/** A refusal for good (5xx) stops an address after this many tries. */
const REFUSALS = 3

interface MailRow {
  id: string
  recipient: string
  subject: string
  text_body: string
  html_body: string
  headers: Record<string, string>
  message_id: string
  tries: number
  queued_at: Date
}

const CLAIM: Statement = {
  name: 'claim-mail',
  text: `UPDATE mail SET tries = tries + 1, next_try_at = $3::timestamptz + make_interval(secs => ${LEASE_SECONDS})
    WHERE group_id = $1 AND id = $2 AND sent_at IS NULL AND given_up_at IS NULL AND next_try_at <= $3
    RETURNING id, recipient, subject, text_body, html_body, headers, message_id, tries, queued_at`,
}
const MARK_SENT: Statement = {
  name: 'mark-mail-sent',
  text: 'UPDATE mail SET sent_at = $3, last_error = NULL WHERE group_id = $1 AND id = $2',
}
const MARK_FAILED: Statement = {
  name: 'mark-mail-failed',
  text: `UPDATE mail SET last_error = $3, next_try_at = $4, given_up_at = $5 WHERE group_id = $1 AND id = $2`,
}
const WAITING: Statement = {
  name: 'waiting-mail',
  text: `SELECT id FROM mail WHERE group_id = $1 AND sent_at IS NULL AND given_up_at IS NULL AND next_try_at <= $2
    ORDER BY next_try_at LIMIT 200`,
}

/**
 * Sends one mail of the outbox. The claim and the mark are transactions of their own, so that no transaction waits for
 * a mail server. Once the server has answered the mail is never sent again; where a crash hides the answer it is sent
 * a second time with the same Message-ID.
 */
export async function deliverMail(
  ctx: AppContext,
  transport: MailTransport,
  { groupId, mailId }: { groupId: string; mailId: string },
): Promise<void> {
  const scope = { groupId, actor: systemActor('mail') }
  const mail = await inGroup(ctx, scope, (tx) => claim(tx, mailId))
  if (!mail) return
  const failure = await trySend(ctx, transport, mail)
  await inGroup(ctx, scope, (tx) => (failure ? markFailed(tx, mail, failure) : markSent(tx, mail)))
}

/** Retries what is waiting, in every group; also picks up what a crash left behind. */
export async function sweepMail(ctx: AppContext, transport: MailTransport): Promise<void> {
  const { rows } = await poolOf(ctx.db).query<{ group_id: string }>(
    'SELECT group_id FROM groups_with_mail_waiting($1)',
    [ctx.clock.now()],
  )
  for (const { group_id: groupId } of rows) {
    const scope = { groupId, actor: systemActor('mail') }
    const waiting = await inGroup(ctx, scope, (tx) => tx.sql<{ id: string }>(WAITING, [groupId, tx.now]))
    for (const { id } of waiting) await deliverMail(ctx, transport, { groupId, mailId: id })
  }
}

async function claim(tx: GroupTx, mailId: string): Promise<MailRow | undefined> {
  const [row] = await tx.sql<MailRow>(CLAIM, [tx.groupId, mailId, tx.now])
  return row
}

interface SendFailure {
  readonly text: string
  readonly refused: boolean
}

async function trySend(
  ctx: AppContext,
  transport: MailTransport,
  mail: MailRow,
): Promise<SendFailure | undefined> {
  try {
    await transport.send({
      from: ctx.config.mailFrom,
      to: mail.recipient,
      subject: mail.subject,
      text: mail.text_body,
      html: mail.html_body,
      messageId: mail.message_id,
      headers: mail.headers,
    })
    return undefined
  } catch (error) {
    const { responseCode, message } = error as { responseCode?: number; message: string }
    const refused = responseCode !== undefined && responseCode >= 500
    ctx.log.warn({ mailId: mail.id, responseCode, tries: mail.tries }, 'mail not taken')
    return { text: String(message).slice(0, 300), refused }
  }
}

async function markSent(tx: GroupTx, mail: MailRow): Promise<void> {
  await tx.sql(MARK_SENT, [tx.groupId, mail.id, tx.now])
}

async function markFailed(tx: GroupTx, mail: MailRow, { text, refused }: SendFailure): Promise<void> {
  const pauseSeconds = Math.min(LONGEST_PAUSE_SECONDS, 15 * 2 ** mail.tries)
  const nextTry = new Date(tx.now.getTime() + pauseSeconds * 1000)
  const tooOld = tx.now.getTime() - mail.queued_at.getTime() > GIVE_UP_AFTER_DAYS * 86_400_000
  const givenUpAt = tooOld || (refused && mail.tries >= REFUSALS) ? tx.now : null
  await tx.sql(MARK_FAILED, [tx.groupId, mail.id, text, nextTry, givenUpAt])
}
