import { invitePerson } from '#shared/contracts/people.ts'
import { inGroup, type GroupTx } from '#server/group-transaction.ts'
import { record } from '#server/services/audit.ts'
import { changePerson } from '#server/services/people/change-person.ts'
import { enrolPerson } from '#server/services/people/invite-person.ts'
import { readPerson } from '#server/services/people/person-record.ts'
import { storePassword } from '#server/services/sign-in/change-password.ts'
import { requireStrongPassword } from '#server/services/sign-in/require-strong-password.ts'
import { emailOf, PEOPLE, phoneOf, type Person, type PersonKey } from '../people.ts'
import { DEMO_SIGN_INS } from '../sign-ins.ts'
import type { Stage } from './stage.ts'

const idName = (person: PersonKey) => `member ${person}`

export const memberId = ({ ids }: Pick<Stage, 'ids'>, person: PersonKey) => ids.of(idName(person))

/** Made when a member is first heard of: the founder acts before being on record. */
export function memberIdAt({ ids }: Pick<Stage, 'ids'>, person: PersonKey, at: Date): string {
  return ids.find(idName(person)) ?? ids.make(idName(person), at)
}

/** Puts a member on record with a password chosen long ago: a demo mails no invitations. */
export async function enrol(stage: Stage, { person }: { person: PersonKey }): Promise<void> {
  const { ctx, by, now, calendar, passwordHashes } = stage
  const { name, roles, callSign, licenceClass, licenceExpiresOn, notes }: Person = PEOPLE[person]
  const id = memberIdAt(stage, person, now)
  const body = invitePerson.body.parse({
    name,
    roles,
    callSign,
    licenceClass,
    licenceExpiresOn: licenceExpiresOn && calendar.day(licenceExpiresOn),
    email: emailOf(name),
    phone: phoneOf(person),
    notes,
  })
  await inGroup(ctx, by, async (tx) => {
    await enrolPerson(tx, { memberId: id, body })
    await checkPassword(tx, id, person)
    await storePassword(tx, id, passwordHashes.get(person)!)
    const own = { ...tx, actor: { ...by.actor, memberId: id, name } }
    const summary = 'accepted the invitation and chose a password'
    await record(own, { action: 'invitation-accepted', subjectType: 'member', subjectId: id, summary })
  })
}

/** The passphrases that everybody knows pass the same check as anybody's. */
async function checkPassword(tx: GroupTx, id: string, person: PersonKey): Promise<void> {
  const signIn = DEMO_SIGN_INS.find((one) => one.person === person)
  if (signIn) await requireStrongPassword(tx, id, signIn.password)
}

export async function noteAbout(
  stage: Stage,
  { person, notes }: { person: PersonKey; notes: string },
): Promise<void> {
  const id = memberId(stage, person)
  await inGroup(stage.ctx, stage.by, async (tx) => {
    const { version, name, email, phone, callSign, licenceClass, licenceExpiresOn } = await readPerson(tx, id)
    const body = { name, email, phone, callSign, licenceClass, licenceExpiresOn, notes }
    await changePerson(tx, stage.ctx, { memberId: id, version, body })
  })
}
