import type { z } from 'zod'
import type { personRecord } from '#shared/contracts/people.ts'
import type { Role } from '#shared/contracts/roles.ts'
import { AppError, notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'

export type PersonRecord = z.output<typeof personRecord>

export interface PersonRow {
  id: string
  name: string
  email: string | null
  phone: string | null
  call_sign: string | null
  licence_class: string | null
  licence_expires_on: string | null
  roles: Role[]
  notes: string
  wants_reminders: boolean
  has_password: boolean
  created_at: Date
  removed_at: Date | null
  version: number
}

/** `t` is the member; for `listPage` and for one record alike. */
export const PERSON_COLUMNS = `t.id, t.name, t.email, t.phone, t.call_sign, t.licence_class,
  t.licence_expires_on::text AS licence_expires_on, t.roles, t.notes, t.wants_reminders,
  EXISTS (SELECT FROM credential c WHERE c.member_id = t.id) AS has_password, t.created_at, t.removed_at, t.version`

const READ: Statement = {
  name: 'read-person',
  text: `SELECT ${PERSON_COLUMNS} FROM member t WHERE t.group_id = $1 AND t.id = $2`,
}
const LOCK: Statement = {
  name: 'lock-person',
  text: `SELECT ${PERSON_COLUMNS} FROM member t WHERE t.group_id = $1 AND t.id = $2 FOR UPDATE OF t`,
}

/** @throws AppError `not-found`. */
export async function readPerson(tx: GroupTx, memberId: string): Promise<PersonRecord> {
  const [row] = await tx.sql<PersonRow>(READ, [tx.groupId, memberId])
  if (!row) throw notFound('member')
  return personOf(row)
}

/**
 * The member, locked, at the version that the caller read.
 * @throws AppError `not-found`; `version-stale` with the record of now; `state-conflict` for a removed member.
 */
export async function lockPerson(
  tx: GroupTx,
  { memberId, version }: { memberId: string; version: number },
): Promise<PersonRow> {
  const [row] = await tx.sql<PersonRow>(LOCK, [tx.groupId, memberId])
  if (!row) throw notFound('member')
  if (row.version !== version) {
    throw new AppError('version-stale', `${row.name} was changed meanwhile. Nothing was saved.`, {
      current: personOf(row),
    })
  }
  if (row.removed_at) throw new AppError('state-conflict', `${row.name} is not a member any more.`)
  return row
}

export function personOf(row: PersonRow): PersonRecord {
  return {
    id: row.id,
    name: row.name,
    email: row.email,
    phone: row.phone,
    callSign: row.call_sign,
    licenceClass: row.licence_class,
    licenceExpiresOn: row.licence_expires_on,
    roles: row.roles,
    notes: row.notes,
    signIn: signInStateOf(row),
    wantsReminders: row.wants_reminders,
    createdAt: row.created_at.toISOString(),
    removedAt: row.removed_at?.toISOString() ?? null,
    version: row.version,
  }
}

function signInStateOf({ email, has_password }: PersonRow): PersonRecord['signIn'] {
  if (email === null) return 'no-sign-in'
  return has_password ? 'active' : 'invited'
}
