import type { ErrorRequestHandler, Request } from 'express'
import { PROBLEMS } from '#shared/contracts/problems.ts'
import type { AppContext } from '../context.ts'
import { AppError } from '../errors.ts'
import { inGroup } from '../group-transaction.ts'
import { recordOutside } from '../services/audit-outside.ts'
import { record } from '../services/audit.ts'

/** Of refusals to nobody in particular this many a minute are kept; more would let anyone fill the log. */
const OUTSIDE_PER_MINUTE = 60

/** Puts every 403 into the audit log: who was refused what (promise P40). The answer is the same where that fails. */
export function auditRefusals(ctx: AppContext): ErrorRequestHandler {
  const mayKeep = perMinute(OUTSIDE_PER_MINUTE)
  return (error: unknown, req, _res, next) => {
    if (!(error instanceof AppError) || PROBLEMS[error.code].status !== 403) return next(error)
    if (!req.caller && !mayKeep(ctx.clock.now())) return next(error)
    keep(ctx, req, error)
      .catch((failure: unknown) =>
        ctx.log.warn({ err: failure, requestId: req.requestId }, 'refusal not kept'),
      )
      .finally(() => next(error))
  }
}

async function keep(ctx: AppContext, req: Request, { code }: AppError): Promise<void> {
  const { caller } = req
  const entry = { action: 'refused', summary: `was refused ${req.method} ${req.path.slice(0, 200)}: ${code}` }
  if (caller) {
    const subject = { subjectType: 'member', subjectId: caller.memberId }
    return inGroup(ctx, caller, (tx) => record(tx, { ...entry, ...subject }))
  }
  const actor = { memberId: null, name: 'Signed out', address: req.ip ?? '', requestId: req.requestId }
  return recordOutside(ctx, actor, entry)
}

function perMinute(most: number): (now: Date) => boolean {
  let minute = 0
  let kept = 0
  return (now) => {
    const current = Math.floor(now.getTime() / 60_000)
    if (current !== minute) kept = 0
    minute = current
    kept += 1
    return kept <= most
  }
}
