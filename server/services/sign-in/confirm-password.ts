import type { Caller } from '../../caller.ts'
import { inGroup } from '../../group-transaction.ts'
import { stepUpSession } from '../sessions.ts'
import { recordPasswordEvent, requireOwnPassword } from './own-password.ts'
import type { SignInDesk } from './sign-in.ts'

/** The password is given again: rights that need a fresh one hold for another hour. Returns the session's new id. */
export async function confirmOwnPassword(desk: SignInDesk, by: Caller, password: string): Promise<string> {
  await requireOwnPassword(desk, by, password)
  return inGroup(desk.ctx, by, async (tx) => {
    await recordPasswordEvent(tx, by, 'password-confirmed', 'gave the password again')
    return stepUpSession(tx, by.sessionId)
  })
}
