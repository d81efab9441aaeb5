import type { Client } from 'pg'

/** Any number, as long as every loading takes the same one: two at once wait for each other. */
const LOADING_LOCK = 6_143_902_557

/** Held until the connection ends. */
export async function waitForOtherLoading(owner: Client): Promise<void> {
  await owner.query('SELECT pg_advisory_lock($1)', [LOADING_LOCK])
}

/** A group is founded closed and opened when it is whole: one that was never opened is what a failed loading left. */
export const UNFINISHED = '(demo AND archived_at IS NOT DISTINCT FROM created_at)'

/** Also where the role sees no group itself: open groups are listed for everybody. */
export async function holdsAGroup(owner: Client): Promise<boolean> {
  const { rows } = await owner.query<{ holds: boolean }>(
    `SELECT EXISTS (SELECT FROM groups WHERE NOT (${UNFINISHED})) OR EXISTS (SELECT FROM list_groups()) AS holds`,
  )
  return rows[0]?.holds ?? false
}

/**
 * Empties a database whose only group was never opened: everything in it belongs to that group, and nobody has seen
 * it. Only the owner of the tables can.
 */
export async function removeUnfinished(owner: Client): Promise<boolean> {
  const { rows } = await owner.query(`SELECT FROM groups WHERE ${UNFINISHED}`)
  if (rows.length === 0 || (await holdsAGroup(owner))) return false
  await owner.query('TRUNCATE groups RESTART IDENTITY CASCADE')
  await owner.query('ALTER SEQUENCE tag_serial RESTART')
  return true
}
