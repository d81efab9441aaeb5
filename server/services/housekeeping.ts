import type { AppContext } from '../context.ts'
import { poolOf } from '../pool.ts'
import { sweepAttachments } from './attachments/sweep-attachments.ts'

const EVERY_MS = 15 * 60_000

/** Removes sessions and counts of wrong passwords that have run out, and files that nothing names. Safe to run anywhere, at any time, twice at once. */
export async function tidyUp(ctx: AppContext): Promise<void> {
  const now = ctx.clock.now()
  const pool = poolOf(ctx.db)
  await pool.query('DELETE FROM session WHERE expire < $1', [now])
  await pool.query('DELETE FROM rate_limit WHERE expire < $1', [now.getTime()])
  await sweepAttachments(ctx)
}

/** Tidies up at the start and every quarter of an hour. */
export function startHousekeeping(ctx: AppContext): { stop(): void } {
  const run = () =>
    void tidyUp(ctx).catch((error: unknown) => ctx.log.warn({ err: error }, 'tidying up failed'))
  run()
  const timer = setInterval(run, EVERY_MS)
  return { stop: () => clearInterval(timer) }
}
