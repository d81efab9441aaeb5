import { setTimeout as pause } from 'node:timers/promises'
import type { RateLimiterPostgres } from 'rate-limiter-flexible'
import type { Actor } from '../../caller.ts'
import type { AppContext } from '../../context.ts'
import { AppError } from '../../errors.ts'
import { inGroup } from '../../group-transaction.ts'
import { mailPasswordLink } from '../people/mail-password-link.ts'
import { findSignIn, type SignInRow } from './find-sign-in.ts'
import { networkOf } from './network-of.ts'
import { keyOf, limiter, takePoint } from './throttle.ts'

/** The answer always takes this long, so that its time does not tell whether a mail was written. */
const ANSWER_AFTER_MS = 100

const HOUR_SECONDS = 3600
const PER_ADDRESS = 20
const PER_ACCOUNT = 3

export interface ResetDesk {
  readonly ctx: AppContext
  readonly perAddress: RateLimiterPostgres
  readonly perAccount: RateLimiterPostgres
}

export function resetDesk(ctx: AppContext): ResetDesk {
  return {
    ctx,
    perAddress: limiter(ctx, 'reset-address', PER_ADDRESS, HOUR_SECONDS),
    perAccount: limiter(ctx, 'reset-account', PER_ACCOUNT, HOUR_SECONDS),
  }
}

/**
 * Mails a link for a new password to whoever has this address; the same answer in the same time when nobody has. More
 * than a few an hour for one account are not mailed, silently: nobody's mailbox is to be filled from here.
 * @throws AppError `too-many-tries` when one address asks too often.
 */
export async function requestPasswordReset(
  desk: ResetDesk,
  { email, actor }: { email: string; actor: Actor },
): Promise<void> {
  await takePoint(desk.perAddress, networkOf(actor.address))
  await Promise.all([pause(ANSWER_AFTER_MS), mailIfKnown(desk, email, actor)])
}

async function mailIfKnown({ ctx, perAccount }: ResetDesk, email: string, actor: Actor): Promise<void> {
  if (!(await mayMail(perAccount, email))) return
  for (const row of await findSignIn(ctx, email)) await mailLink(ctx, row, actor)
}

async function mayMail(perAccount: RateLimiterPostgres, email: string): Promise<boolean> {
  try {
    await takePoint(perAccount, keyOf(email))
    return true
  } catch (error) {
    if (error instanceof AppError && error.code === 'too-many-tries') return false
    throw error
  }
}

/** Who has not chosen a password yet gets the invitation again, not a reset: the words fit, and it lasts longer. */
async function mailLink(ctx: AppContext, row: SignInRow, actor: Actor): Promise<void> {
  const purpose = row.password_hash === null ? 'invitation' : 'password-reset'
  await inGroup(ctx, { groupId: row.group_id, actor }, (tx) =>
    mailPasswordLink(tx, ctx, { memberId: row.member_id, purpose }),
  )
}
