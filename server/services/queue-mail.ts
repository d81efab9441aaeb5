import { v7 as uuidv7 } from 'uuid'
import type { GroupTx, Statement } from '../group-transaction.ts'
import { enqueue } from './enqueue.ts'

export interface NewMail {
  /** Absent for a recipient who is no member. */
  readonly memberId?: string
  /** One address. */
  readonly recipient: string
  readonly subject: string
  readonly text: string
  readonly html: string
  readonly headers?: Readonly<Record<string, string>>
}

const INSERT: Statement = {
  name: 'insert-mail',
  text: `INSERT INTO mail (id, group_id, member_id, recipient, subject, text_body, html_body, headers, message_id,
    queued_at, next_try_at) VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $10)`,
}

/** One address of printable ASCII, no list, no comment, no quoted part. */
const ADDRESS = /^[\w.!#$%&'*+/=?^`{|}~-]{1,64}@[\w.-]{1,189}$/

const HEADER_NAME = /^[A-Za-z0-9-]{1,76}$/

/**
 * Queues a mail in the transaction of its cause: it is sent exactly when that is kept. Its Message-ID is made here, so
 * that a second sending after a crash is recognised.
 * @throws Error for anything that could begin another header or address somebody else.
 */
export async function queueMail(tx: GroupTx, mail: NewMail): Promise<string> {
  if (!ADDRESS.test(mail.recipient)) throw new Error('A mail needs one plain address')
  const headers = mail.headers ?? {}
  for (const [name, value] of Object.entries(headers)) {
    if (!HEADER_NAME.test(name) || hasControl(value)) throw new Error(`The mail header ${name} is not safe`)
  }
  if (hasControl(mail.subject)) throw new Error('A mail subject is one line')
  const id = uuidv7()
  const values = [id, tx.groupId, mail.memberId ?? null, mail.recipient, mail.subject, mail.text, mail.html]
  await tx.sql(INSERT, [...values, JSON.stringify(headers), `<${id}@halyard.invalid>`, tx.now])
  await enqueue(tx, 'send-mail', { mailId: id })
  return id
}

const hasControl = (value: string) => /\p{Cc}/u.test(value)
