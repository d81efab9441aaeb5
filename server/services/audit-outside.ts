import type { Actor } from '../caller.ts'
import type { AppContext } from '../context.ts'
import { poolOf } from '../pool.ts'

const INSERT = {
  name: 'insert-audit-outside',
  text: `INSERT INTO audit_event (at, actor, address, request_id, action, summary) VALUES ($1, $2, $3, $4, $5, $6)`,
}

/** Audits what belongs to no group: a sign-in with an unknown address, a refusal of someone signed out. */
export async function recordOutside(
  ctx: AppContext,
  actor: Actor,
  { action, summary }: { action: string; summary: string },
): Promise<void> {
  const values = [ctx.clock.now(), actor.name, actor.address, actor.requestId, action, summary]
  await poolOf(ctx.db).query({ ...INSERT, values })
}
