import type { z } from 'zod'
import type { invitePerson } from '#shared/contracts/people.ts'
import type { AppContext } from '../../context.ts'
import { Member } from '../../entities/Member.ts'
import { AppError } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { sameContent } from '../registry/changes.ts'
import { idTaken } from '../registry/duplicates.ts'
import { lockNewId } from '../registry/locks.ts'
import { mailPasswordLink } from './mail-password-link.ts'
import { readPerson, type PersonRecord } from './person-record.ts'
import { namingEmail } from './write-person.ts'

export type Invitation = z.output<typeof invitePerson.body>

const CREATION: Statement = {
  name: 'creation-of-member',
  text: `SELECT after FROM audit_event WHERE group_id = $1 AND subject_id = $2 AND action = 'member-added'
    ORDER BY id LIMIT 1`,
}
const FIND: Statement = { name: 'find-member', text: 'SELECT id FROM member WHERE group_id = $1 AND id = $2' }

interface NewPerson {
  readonly memberId: string
  readonly body: Invitation
}

/**
 * Adds a member and mails the invitation, where there is an address. The same id with the same content again is the
 * same success, without another mail; with other content it is `id-taken`.
 */
export async function addPerson(
  tx: GroupTx,
  ctx: AppContext,
  { memberId, body }: NewPerson,
): Promise<PersonRecord> {
  await lockNewId(tx, memberId)
  const known = await tx.sql(FIND, [tx.groupId, memberId])
  if (known.length > 0) await requireSameCreation(tx, { memberId, body })
  else await insertPerson(tx, ctx, { memberId, body })
  return readPerson(tx, memberId)
}

/** A fresh invitation for a member who has not chosen a password yet. The one before stops working. */
export async function invitePersonAgain(
  tx: GroupTx,
  ctx: AppContext,
  memberId: string,
): Promise<PersonRecord> {
  const person = await readPerson(tx, memberId)
  if (person.removedAt) throw new AppError('state-conflict', `${person.name} is not a member any more.`)
  if (person.signIn === 'no-sign-in')
    throw new AppError('state-conflict', `${person.name} has no e-mail address to send it to.`)
  if (person.signIn === 'active')
    throw new AppError('state-conflict', `${person.name} has chosen a password already.`)
  await mailPasswordLink(tx, ctx, { memberId, purpose: 'invitation' })
  return person
}

async function requireSameCreation(tx: GroupTx, { memberId, body }: NewPerson): Promise<void> {
  const [first] = await tx.sql<{ after: unknown }>(CREATION, [tx.groupId, memberId])
  if (!first || !sameContent(first.after, body)) throw idTaken()
}

async function insertPerson(tx: GroupTx, ctx: AppContext, person: NewPerson): Promise<void> {
  await enrolPerson(tx, person)
  await mailPasswordLink(tx, ctx, { memberId: person.memberId, purpose: 'invitation' })
}

/** Adds a member without inviting them: nothing is mailed. */
export async function enrolPerson(tx: GroupTx, { memberId, body }: NewPerson): Promise<void> {
  await namingEmail(() => insertRow(tx, { memberId, body }))
  await record(tx, {
    action: 'member-added',
    subjectType: 'member',
    subjectId: memberId,
    summary: `added ${body.name} as ${body.roles.join(', ')}`,
    after: body,
  })
}

async function insertRow(tx: GroupTx, { memberId, body }: NewPerson): Promise<void> {
  try {
    await tx.repository(Member).insert({ id: memberId, ...body, version: 1, createdAt: tx.now })
  } catch (error) {
    const driver = (error as { driverError?: { constraint?: string } }).driverError
    throw driver?.constraint === 'member_pkey' ? idTaken() : error
  }
}
