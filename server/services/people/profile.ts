import type { z } from 'zod'
import type { changeProfile, profileRecord } from '#shared/contracts/profile.ts'
import { Member } from '../../entities/Member.ts'
import { AppError, notFound } from '../../errors.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { changesOf, fieldNames, isEmpty } from '../registry/changes.ts'

type ProfileRecord = z.output<typeof profileRecord>
type ProfileBody = z.output<typeof changeProfile.body>

/** The member's own record. */
export async function readProfileOf(tx: GroupTx, memberId: string): Promise<ProfileRecord> {
  const row = await tx.repository(Member).findOneBy({ id: memberId })
  if (!row) throw notFound('member')
  return profileOf(row)
}

interface ProfileChange {
  readonly memberId: string
  readonly version: number
  readonly body: ProfileBody
}

/** @throws AppError `version-stale` with the record of now. */
export async function changeProfileOf(
  tx: GroupTx,
  { memberId, version, body }: ProfileChange,
): Promise<ProfileRecord> {
  const members = tx.repository(Member)
  const row = await members.findOneForUpdate({ id: memberId })
  if (!row) throw notFound('member')
  if (row.version !== version) {
    throw new AppError('version-stale', 'Your record was changed meanwhile. Nothing was saved.', {
      current: profileOf(row),
    })
  }
  const changes = changesOf(row, body)
  if (isEmpty(changes)) return profileOf(row)
  await members.update({ id: memberId }, { ...body, version: version + 1 })
  await record(tx, {
    action: 'profile-changed',
    subjectType: 'member',
    subjectId: memberId,
    summary: `changed their own ${fieldNames(changes)}`,
    ...changes,
  })
  return readProfileOf(tx, memberId)
}

function profileOf(row: Member): ProfileRecord {
  return {
    id: row.id,
    name: row.name,
    email: row.email,
    phone: row.phone,
    callSign: row.callSign,
    licenceClass: row.licenceClass,
    licenceExpiresOn: row.licenceExpiresOn,
    roles: row.roles,
    temperatureUnit: row.temperatureUnit,
    lengthUnit: row.lengthUnit,
    wantsReminders: row.wantsReminders,
    version: row.version,
  }
}
