import { setTimeout as pause } from 'node:timers/promises'
import pg from 'pg'
import type { AppContext } from './context.ts'
import { ConfigError } from './config.ts'
import { migrate } from './data-source.ts'
import { databaseFaults } from './database-safety.ts'
import { fromDatabaseError } from './middleware/database-problem.ts'

const FIRST_PAUSE_MS = 250
const LONGEST_PAUSE_MS = 5000

/** Wrong password, role, database or rights: waiting does not mend these. */
const WRONG_ADDRESS = new Set(['28P01', '28000', '3D000', '42501', '22023'])

/**
 * Migrates, connects and checks. While the database is away it waits and tries again, `onAway` being told each time.
 * @throws ConfigError when the settings or the database are not fit for records.
 */
export async function prepareDatabase(ctx: AppContext, onAway: (error: unknown) => void): Promise<void> {
  for (let waitMs = FIRST_PAUSE_MS; ; waitMs = Math.min(waitMs * 2, LONGEST_PAUSE_MS)) {
    try {
      return await prepareOnce(ctx)
    } catch (error) {
      if (fromDatabaseError(error)?.code !== 'unavailable') throw explain(error)
      onAway(error)
      await pause(waitMs)
    }
  }
}

async function prepareOnce(ctx: AppContext): Promise<void> {
  const { databaseOwnerUrl, databaseUrl } = ctx.config
  if (databaseOwnerUrl !== databaseUrl || (await mayMigrate(databaseUrl))) await migrate(databaseOwnerUrl)
  if (!ctx.db.isInitialized) await ctx.db.initialize()
  const faults = ctx.config.env === 'production' ? await databaseFaults(ctx) : []
  if (faults.length > 0)
    throw new ConfigError(`The database is not safe for records:\n  ${faults.join('\n  ')}`)
}

/** With one address only, its role migrates if it may; otherwise the schema was brought up to date beforehand. */
async function mayMigrate(url: string): Promise<boolean> {
  const client = new pg.Client({ connectionString: url, connectionTimeoutMillis: 5000 })
  client.on('error', () => undefined)
  await client.connect()
  try {
    const { rows } = await client.query<{ may: boolean }>(
      `SELECT has_schema_privilege(session_user, 'public', 'CREATE') AS may`,
    )
    return rows[0]?.may ?? false
  } finally {
    await client.end()
  }
}

function explain(error: unknown): unknown {
  const { code, message } = error as { code?: string; message?: string }
  return WRONG_ADDRESS.has(code ?? '') ? new ConfigError(`The database refuses us: ${message}`) : error
}
