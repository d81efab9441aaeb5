import pg from 'pg'
import type { TestApp } from './test-app.ts'

export interface AuditRow {
  group_id: string | null
  member_id: string | null
  actor: string
  address: string
  request_id: string
  action: string
  subject_id: string | null
  summary: string
  before: Record<string, unknown> | null
  after: Record<string, unknown> | null
}

/** Every audit entry, oldest first, of all groups and of none; read as the owner. */
export async function auditEntries(app: TestApp, action?: string): Promise<AuditRow[]> {
  const rows = await asOwner<AuditRow>(app, 'SELECT * FROM audit_event ORDER BY id')
  return action === undefined ? rows : rows.filter((row) => row.action === action)
}

/** Runs SQL past row-level security, as the schema's owner. */
export async function asOwner<Row extends pg.QueryResultRow>(
  app: TestApp,
  sql: string,
  values: unknown[] = [],
): Promise<Row[]> {
  const client = new pg.Client({ connectionString: app.database?.ownerUrl })
  client.on('error', () => undefined)
  await client.connect()
  try {
    return (await client.query<Row>(sql, values)).rows
  } finally {
    await client.end()
  }
}
