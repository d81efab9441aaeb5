import type { AppContext } from '../context.ts'
import { poolOf } from '../pool.ts'

export interface GroupEntry {
  readonly id: string
  /** IANA name. */
  readonly time_zone: string
}

/** Every group there is, for work that goes through them one by one, each in a transaction of its own. */
export async function listGroups({ db }: AppContext): Promise<GroupEntry[]> {
  const { rows } = await poolOf(db).query<GroupEntry>('SELECT id, time_zone FROM list_groups()')
  return rows
}
