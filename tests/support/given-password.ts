import { Credential } from '#server/entities/Credential.ts'
import { hashPassword } from '#server/services/sign-in/password-hash.ts'
import type { TestApp, TestMember } from './test-app.ts'

/** Long enough, and of nobody's making. */
export const PASSWORD = 'plum cartwheel seldom quarry'

let hash: Promise<string> | undefined

/** Lets a member sign in with `PASSWORD`; hashed once for all. */
export async function givenPassword(app: TestApp, member: TestMember): Promise<void> {
  const passwordHash = await (hash ??= hashPassword(PASSWORD))
  await app.inGroup({ id: member.groupId }, async (tx) => {
    const { memberId, groupId } = member
    await tx.manager.insert(Credential, { memberId, groupId, passwordHash, changedAt: tx.now })
  })
}
