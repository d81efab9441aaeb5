import type { PoolClient, QueryResultRow } from 'pg'
import type { EntityManager, EntityTarget, ObjectLiteral, QueryRunner } from 'typeorm'
import { localDateOf } from '#shared/engine/local-day.ts'
import type { PlainDate } from '#shared/engine/plain-date.ts'
import type { Actor } from './caller.ts'
import type { AppContext } from './context.ts'
import { GroupRepository } from './group-repository.ts'
import { inOneWrite } from './one-write.ts'

/** A statement that PostgreSQL plans once per connection, for the paths that are called often. */
export interface Statement {
  readonly name: string
  readonly text: string
}

/** One transaction inside one group: the only way to a group's rows. */
export interface GroupTx {
  readonly groupId: string
  readonly actor: Actor
  /** One instant for the whole transaction. */
  readonly now: Date
  readonly manager: EntityManager
  /** Named SQL on the same connection; statements sent without waiting are pipelined. */
  sql<Row extends QueryResultRow>(statement: Statement, values?: readonly unknown[]): Promise<Row[]>
  /** A repository that adds the group to every condition and to every new row. */
  repository<Row extends ObjectLiteral>(entity: EntityTarget<Row>): GroupRepository<Row>
  /** The group's IANA time zone. */
  zone(): Promise<string>
  /** Today in the group's zone. */
  today(): Promise<PlainDate>
}

interface Scope {
  readonly groupId: string
  readonly actor: Actor
}

export const SET_GROUP: Statement = {
  name: 'set-group',
  text: `SELECT set_config('halyard.group_id', $1, true)`,
}
const GROUP_ZONE: Statement = { name: 'group-zone', text: 'SELECT time_zone FROM groups WHERE id = $1' }
const TRIES = 3

/**
 * Runs `work` in a transaction that sees the rows of one group only. The group is set by SET LOCAL, so it ends with
 * the transaction. Serialisation failures and deadlocks are tried again, three times in all; `work` must therefore
 * have no effect outside the transaction.
 */
export async function inGroup<T>(
  ctx: AppContext,
  scope: Scope,
  work: (tx: GroupTx) => Promise<T>,
): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await once(ctx, scope, work)
    } catch (error) {
      if (attempt === TRIES || !isRetryable(error)) throw error
    }
  }
}

async function once<T>(ctx: AppContext, scope: Scope, work: (tx: GroupTx) => Promise<T>): Promise<T> {
  const runner = ctx.db.createQueryRunner()
  const client = (await runner.connect()) as PoolClient
  try {
    inOneWrite(client)
    const begun = client.query('BEGIN')
    const set = client.query({ ...SET_GROUP, values: [scope.groupId] })
    // Sent together with the first statement of `work`; a failure of either surfaces there or at the commit.
    begun.catch(() => undefined)
    set.catch(() => undefined)
    markTransaction(runner, true)
    const result = await work(groupTx(runner, client, scope, ctx.clock.now()))
    await Promise.all([begun, set])
    const { command } = await client.query('COMMIT')
    // PostgreSQL answers the COMMIT of a failed transaction with ROLLBACK and no error: a statement's error was lost.
    if (command !== 'COMMIT') throw new Error('The transaction had failed before its commit')
    return result
  } catch (error) {
    await client.query('ROLLBACK').catch(() => undefined)
    throw error
  } finally {
    markTransaction(runner, false)
    await runner.release()
  }
}

/** Repositories must join the transaction opened here instead of opening one of their own. */
function markTransaction(runner: { isTransactionActive: boolean }, active: boolean): void {
  runner.isTransactionActive = active
}

function groupTx(runner: QueryRunner, client: PoolClient, scope: Scope, now: Date): GroupTx {
  const sql = <Row extends QueryResultRow>(statement: Statement, values: readonly unknown[] = []) => {
    inOneWrite(client)
    const rows = client.query<Row>({ ...statement, values: [...values] }).then((result) => result.rows)
    // When several are under way and the first fails, nobody waits for the others: they must not count as unhandled.
    rows.catch(() => undefined)
    return rows
  }
  let zone: Promise<string> | undefined
  const readZone = async () => {
    const [row] = await sql<{ time_zone: string }>(GROUP_ZONE, [scope.groupId])
    if (!row) throw new Error(`No group ${scope.groupId}`)
    return row.time_zone
  }
  const zoneOnce = () => (zone ??= readZone())
  return {
    groupId: scope.groupId,
    actor: scope.actor,
    now,
    manager: runner.manager,
    sql,
    repository: (entity) => new GroupRepository(runner.manager.getRepository(entity), scope.groupId),
    zone: zoneOnce,
    today: async () => localDay(now, await zoneOnce()),
  }
}

/** The calendar day of an instant in a zone that the database holds, hence a known one. */
export function localDay(at: Date, zone: string): PlainDate {
  const day = localDateOf(at.getTime(), zone)
  if (typeof day !== 'string') throw new Error(day.message)
  return day
}

function isRetryable(error: unknown): boolean {
  const code =
    (error as { code?: string }).code ?? (error as { driverError?: { code?: string } }).driverError?.code
  return code === '40001' || code === '40P01'
}
