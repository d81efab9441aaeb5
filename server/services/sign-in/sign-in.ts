import type { Actor } from '../../caller.ts'
import type { AppContext } from '../../context.ts'
import { Credential } from '../../entities/Credential.ts'
import { Member } from '../../entities/Member.ts'
import { AppError } from '../../errors.ts'
import { inGroup, type GroupTx } from '../../group-transaction.ts'
import { recordOutside } from '../audit-outside.ts'
import { record } from '../audit.ts'
import { endSession, openSession } from '../sessions.ts'
import { findSignIn, type SignInRow } from './find-sign-in.ts'
import { hashPassword, isOutdated, verifyPassword } from './password-hash.ts'
import type { PasswordThrottle } from './throttle.ts'

/** What signing in needs beside the request. */
export interface SignInDesk {
  readonly ctx: AppContext
  readonly throttle: PasswordThrottle
}

export interface SignInRequest {
  readonly email: string
  readonly password: string
  readonly ownDevice: boolean
  readonly device: string
  readonly actor: Actor
  /** The session that this browser had before; it ends. */
  readonly old?: { readonly sid: string; readonly memberId: string }
}

export interface SignedIn {
  readonly sid: string
  readonly memberId: string
  readonly groupId: string
}

/** Hashes are dear: of an address in more groups than this only the oldest memberships are tried. */
const MOST_GROUPS = 3

type Found = SignInRow & { password_hash: string }

/**
 * Opens a session for the member whose address and password these are.
 * @throws AppError `sign-in-refused`, the same for an unknown address and a wrong password; `too-many-tries`;
 * `unavailable` when too many sign in at once.
 */
export async function signIn({ ctx, throttle }: SignInDesk, request: SignInRequest): Promise<SignedIn> {
  const attempt = await throttle.admit(request.email, request.actor.address)
  let known: SignInRow[]
  let member: Found | undefined
  try {
    known = await findSignIn(ctx, request.email)
    member = await whosePassword(known, request.password)
  } catch (error) {
    await attempt.takeBack()
    throw error
  }
  if (!member) {
    await recordRefusal(ctx, request.actor, known[0])
    throw new AppError('sign-in-refused', 'Check both, or ask for a link to set a new password.')
  }
  await attempt.succeed()
  return openFor(ctx, member, request)
}

async function whosePassword(known: readonly SignInRow[], password: string): Promise<Found | undefined> {
  const able = known.filter((row): row is Found => row.password_hash !== null).slice(0, MOST_GROUPS)
  if (able.length === 0) await verifyPassword(null, password)
  for (const row of able) {
    if (await verifyPassword(row.password_hash, password)) return row
  }
  return undefined
}

async function recordRefusal(ctx: AppContext, actor: Actor, known: SignInRow | undefined): Promise<void> {
  const entry = { action: 'sign-in-refused', summary: 'was refused: address or password not right' }
  if (!known) return recordOutside(ctx, actor, entry)
  const subject = { subjectType: 'member', subjectId: known.member_id }
  await inGroup(ctx, { groupId: known.group_id, actor }, (tx) => record(tx, { ...entry, ...subject }))
}

async function openFor(ctx: AppContext, member: Found, request: SignInRequest): Promise<SignedIn> {
  const { member_id: memberId, group_id: groupId } = member
  // Outside the transaction, which must not wait for the gate.
  const renewed = isOutdated(member.password_hash) ? await hashPassword(request.password) : undefined
  const sid = await inGroup(ctx, { groupId, actor: request.actor }, async (tx) => {
    const row = await tx.repository(Member).findOneBy({ id: memberId })
    if (!row) throw new AppError('sign-in-refused', 'This membership has ended.')
    const own = { ...tx, actor: { ...tx.actor, memberId, name: row.name } }
    if (renewed) await keepHash(own, member, renewed)
    if (request.old) await endSession(own, request.old)
    await record(own, {
      action: 'signed-in',
      subjectType: 'member',
      subjectId: memberId,
      summary: request.ownDevice ? 'signed in on a device of their own' : 'signed in',
    })
    const { ownDevice, device, actor } = request
    return openSession(own, { memberId, ownDevice, device, address: actor.address })
  })
  return { sid, memberId, groupId }
}

/** Keeps a hash of today's strength, unless the password was changed meanwhile. */
async function keepHash(tx: GroupTx, { member_id: memberId, password_hash: old }: Found, renewed: string) {
  await tx.repository(Credential).update({ memberId, passwordHash: old }, { passwordHash: renewed })
}
