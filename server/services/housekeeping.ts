import type { AppContext } from '../context.ts'
import { poolOf } from '../pool.ts'

const EVERY_MS = 15 * 60_000

/** Removes sessions and counts of wrong passwords that have run out. Safe to run anywhere, at any time, twice at once. */
export async function tidyUp({ db, clock }: AppContext): Promise<void> {
  const now = clock.now()
  const pool = poolOf(db)
  await pool.query('DELETE FROM session WHERE expire < $1', [now])
  await pool.query('DELETE FROM rate_limit WHERE expire < $1', [now.getTime()])
}

/** Tidies up at the start and every quarter of an hour. */
export function startHousekeeping(ctx: AppContext): { stop(): void } {
  const run = () =>
    void tidyUp(ctx).catch((error: unknown) => ctx.log.warn({ err: error }, 'tidying up failed'))
  run()
  const timer = setInterval(run, EVERY_MS)
  return { stop: () => clearInterval(timer) }
}
