import type { PoolClient } from 'pg'
import type { DataSource, QueryRunner } from 'typeorm'
import type { AppContext } from '#server/context.ts'

/** Any number, as long as every loading takes the same one: two at once wait for each other. */
const LOADING_LOCK = 6_143_902_557

/** What a service's transaction becomes inside ours. */
const NESTED: Readonly<Record<string, string>> = {
  BEGIN: 'SAVEPOINT step',
  COMMIT: 'RELEASE SAVEPOINT step',
  ROLLBACK: 'ROLLBACK TO SAVEPOINT step',
}

/**
 * Runs `work` with a context whose every service transaction is a savepoint of one transaction: all of it is kept, or,
 * whatever fails and however the process ends, nothing. `work` must take one step after the other.
 */
export async function inOneTransaction<T>(
  ctx: AppContext,
  work: (ctx: AppContext) => Promise<T>,
): Promise<T> {
  const runner = ctx.db.createQueryRunner()
  const client = (await runner.connect()) as PoolClient
  try {
    await client.query('BEGIN')
    await client.query('SELECT pg_advisory_xact_lock($1)', [LOADING_LOCK])
    const result = await work({ ...ctx, db: lending(ctx.db, runner, nesting(client)) })
    await client.query('COMMIT')
    return result
  } catch (error) {
    await client.query('ROLLBACK').catch(() => undefined)
    throw error
  } finally {
    await runner.release()
  }
}

/** A data source that lends the same connection every time and never takes it back. */
function lending(db: DataSource, runner: QueryRunner, client: PoolClient): DataSource {
  const lent = withOverrides(runner, {
    connect: () => Promise.resolve(client),
    release: () => Promise.resolve(),
  })
  return withOverrides(db, { createQueryRunner: () => lent })
}

function nesting(client: PoolClient): PoolClient {
  const query = async (text: unknown, ...rest: unknown[]) => {
    const nested = typeof text === 'string' ? NESTED[text] : undefined
    const send = client.query.bind(client) as (...args: unknown[]) => Promise<{ command: string }>
    if (nested === undefined) return send(text, ...rest)
    // The caller looks at the command to see whether its commit was one.
    return { ...(await send(nested)), command: text }
  }
  return withOverrides(client, { query })
}

function withOverrides<T extends object>(target: T, overrides: Readonly<Record<string, unknown>>): T {
  return new Proxy(target, {
    get: (inner, key) =>
      typeof key === 'string' && key in overrides ? overrides[key] : Reflect.get(inner, key, inner),
    set: (inner, key, value) => Reflect.set(inner, key, value, inner),
  })
}
