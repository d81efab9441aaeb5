import pg from 'pg'
import type { TestApp } from './test-app.ts'

export interface TableContent {
  readonly table: string
  readonly rows: number
  /** Of all rows as text, whatever their order. */
  readonly hash: string | null
}

/** What every table holds, for one group or for all; two equal answers mean that nothing was written in between. */
export async function allRows(app: TestApp, groupId?: string): Promise<TableContent[]> {
  const client = new pg.Client({ connectionString: app.database?.ownerUrl })
  client.on('error', () => undefined)
  await client.connect()
  try {
    const tables = await client.query<{ table: string }>(groupId === undefined ? ALL_TABLES : GROUP_TABLES)
    const condition = groupId === undefined ? '' : `WHERE t.group_id = '${groupId}'`
    const parts = tables.rows.map(
      ({ table }) =>
        `SELECT '${table}' AS table, count(*)::int AS rows, md5(string_agg(t::text, '' ORDER BY t::text)) AS hash
         FROM ${table} t ${condition}`,
    )
    return (await client.query<TableContent>(parts.join(' UNION ALL '))).rows
  } finally {
    await client.end()
  }
}

const ALL_TABLES = `SELECT relname AS table FROM pg_class
  WHERE relnamespace = 'public'::regnamespace AND relkind = 'r' ORDER BY 1`

const GROUP_TABLES = `SELECT table_name AS table FROM information_schema.columns
  WHERE table_schema = 'public' AND column_name = 'group_id' ORDER BY 1`
