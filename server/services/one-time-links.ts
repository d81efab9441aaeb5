import { createHash, randomBytes } from 'node:crypto'
import { v7 as uuidv7 } from 'uuid'
import type { AppContext } from '../context.ts'
import { AppError } from '../errors.ts'
import type { GroupTx, Statement } from '../group-transaction.ts'
import { poolOf } from '../pool.ts'

/** Links that set a password. */
export type LinkPurpose = 'invitation' | 'password-reset'

/** How long a link works (promise P22). */
const LIFE_MS: Record<LinkPurpose, number> = { invitation: 24 * 3_600_000, 'password-reset': 30 * 60_000 }

const PAGES: Record<LinkPurpose, string> = { invitation: 'invitation', 'password-reset': 'reset-password' }

const INSERT: Statement = {
  name: 'insert-one-time-link',
  text: `INSERT INTO one_time_link (id, group_id, member_id, purpose, token_hash, created_at, expires_at)
    VALUES ($1, $2, $3, $4, $5, $6, $7)`,
}
const END_ALL: Statement = {
  name: 'end-one-time-links',
  text: `UPDATE one_time_link SET used_at = $3
    WHERE group_id = $1 AND member_id = $2 AND purpose <> 'reminders' AND used_at IS NULL`,
}
const USE: Statement = {
  name: 'use-one-time-link',
  text: `UPDATE one_time_link SET used_at = $3
    WHERE group_id = $1 AND id = $2 AND used_at IS NULL AND expires_at > $3 RETURNING id`,
}
const FIND = { name: 'find-one-time-link', text: 'SELECT * FROM find_one_time_link($1)' }

export interface OpenLink {
  readonly id: string
  readonly groupId: string
  readonly memberId: string
  readonly purpose: LinkPurpose
}

interface LinkRow {
  id: string
  group_id: string
  member_id: string
  purpose: LinkPurpose | 'reminders'
  expires_at: Date
  used_at: Date | null
}

const hashOf = (token: string) => createHash('sha256').update(token).digest()

/**
 * Makes a link that sets the member's password, in the place of any before. Its address is built from the configured
 * one; the token stands behind `#`, so that it reaches no log on its way. At rest there is only its hash.
 */
export async function makeLink(
  tx: GroupTx,
  ctx: AppContext,
  { memberId, purpose }: { memberId: string; purpose: LinkPurpose },
): Promise<string> {
  await endLinksOf(tx, memberId)
  const token = randomBytes(32).toString('base64url')
  const endsAt = new Date(tx.now.getTime() + LIFE_MS[purpose])
  await tx.sql(INSERT, [uuidv7(), tx.groupId, memberId, purpose, hashOf(token), tx.now, endsAt])
  return `${ctx.config.publicUrl}/${PAGES[purpose]}#${token}`
}

/** Ends every link that would set the member's password. */
export async function endLinksOf(tx: GroupTx, memberId: string): Promise<void> {
  await tx.sql(END_ALL, [tx.groupId, memberId, tx.now])
}

/** @throws AppError `link-invalid`, the same for a link that never was, has run out or was used. */
export async function findOpenLink(ctx: AppContext, token: string): Promise<OpenLink> {
  const { rows } = await poolOf(ctx.db).query<LinkRow>({ ...FIND, values: [hashOf(token)] })
  const row = rows[0]
  if (!row || row.purpose === 'reminders' || row.used_at || row.expires_at <= ctx.clock.now())
    throw linkInvalid()
  return { id: row.id, groupId: row.group_id, memberId: row.member_id, purpose: row.purpose }
}

/** Uses the link up. Of two requests at once one gets through. */
export async function useLink(tx: GroupTx, link: OpenLink): Promise<void> {
  const used = await tx.sql(USE, [tx.groupId, link.id, tx.now])
  if (used.length === 0) throw linkInvalid()
}

function linkInvalid(): AppError {
  return new AppError('link-invalid', 'It was used, has run out, or a newer one was sent. Ask for another.')
}
