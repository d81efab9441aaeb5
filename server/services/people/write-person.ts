import { Member } from '../../entities/Member.ts'
import { AppError } from '../../errors.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { changesOf, fieldNames, isEmpty } from '../registry/changes.ts'
import type { PersonRow } from './person-record.ts'

const EMAIL_TAKEN = 'Another member of your group has that e-mail address already.'

interface PersonChange {
  readonly row: PersonRow
  readonly columns: Partial<Member>
  readonly action: string
  /** A sentence without its actor; the names of the changed fields are added where it ends in a colon. */
  readonly summary: string
}

/** Writes what differs, raises the version and audits it. Nothing differs: nothing is written. False then. */
export async function writePerson(
  tx: GroupTx,
  { row, columns, action, summary }: PersonChange,
): Promise<boolean> {
  const changes = changesOf(columnsOf(row), columns)
  if (isEmpty(changes)) return false
  await namingEmail(() =>
    tx.repository(Member).update({ id: row.id }, { ...columns, version: row.version + 1 }),
  )
  await record(tx, {
    action,
    subjectType: 'member',
    subjectId: row.id,
    summary: summary.endsWith(':') ? `${summary} ${fieldNames(changes)}` : summary,
    ...changes,
  })
  return true
}

/** @throws AppError `already-exists` that names `#/email` when another member of the group has the address. */
export async function namingEmail<T>(write: () => Promise<T>): Promise<T> {
  try {
    return await write()
  } catch (error) {
    const driver = (error as { driverError?: { constraint?: string } }).driverError
    if (driver?.constraint !== 'member_email') throw error
    throw new AppError('already-exists', EMAIL_TAKEN, {
      errors: [{ pointer: '#/email', detail: EMAIL_TAKEN }],
    })
  }
}

/** The row under the entity's names, to compare with what is to be written. */
function columnsOf(row: PersonRow): Partial<Member> {
  return {
    name: row.name,
    email: row.email,
    phone: row.phone,
    callSign: row.call_sign,
    licenceClass: row.licence_class,
    licenceExpiresOn: row.licence_expires_on,
    roles: row.roles,
    notes: row.notes,
    wantsReminders: row.wants_reminders,
    removedAt: row.removed_at,
  }
}
