import argon2 from 'argon2'
import { Credential } from '#server/entities/Credential.ts'
import { hashPassword } from '#server/services/sign-in/password-hash.ts'
import type { TestApp, TestMember } from './test-app.ts'

/** Long enough, and of nobody's making. */
export const PASSWORD = 'plum cartwheel seldom quarry'

const hashes = new Map<string, Promise<string>>()

/** Lets a member sign in with a password; each is hashed once for all. */
export async function givenPassword(app: TestApp, member: TestMember, password = PASSWORD): Promise<void> {
  const hash = hashes.get(password) ?? hashPassword(password)
  hashes.set(password, hash)
  await keepHash(app, member, await hash)
}

/** The same with a hash that is quickly judged, for tests of many wrong tries. */
export async function givenCheapPassword(app: TestApp, member: TestMember): Promise<void> {
  const cheap = { type: argon2.argon2id, memoryCost: 1024, timeCost: 2, parallelism: 1 } as const
  await keepHash(app, member, await argon2.hash(PASSWORD, cheap))
}

async function keepHash(app: TestApp, { memberId, groupId }: TestMember, passwordHash: string) {
  await app.inGroup({ id: groupId }, (tx) =>
    tx.manager.insert(Credential, { memberId, groupId, passwordHash, changedAt: tx.now }),
  )
}
