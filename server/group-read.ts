import type { PoolClient, QueryResult } from 'pg'
import type { AppContext } from './context.ts'
import { SET_GROUP, type Statement } from './group-transaction.ts'
import { inOneWrite } from './one-write.ts'
import { poolOf } from './pool.ts'

export interface Question {
  readonly statement: Statement
  readonly values: readonly unknown[]
}

const BEGIN = 'BEGIN ISOLATION LEVEL REPEATABLE READ READ ONLY'

/**
 * Asks named statements of one group in one read-only transaction, all sent at once: a single round trip for the pages
 * that are read most. All answers are of one instant. Rows come as the driver makes them.
 */
export async function readInGroup(
  ctx: AppContext,
  groupId: string,
  questions: readonly Question[],
): Promise<Record<string, unknown>[][]> {
  const client = await poolOf(ctx.db).connect()
  try {
    const answers = await Promise.allSettled(send(client, groupId, questions))
    const failed = answers.find((answer) => answer.status === 'rejected')
    if (failed) throw failed.reason
    return answers
      .slice(2, -1)
      .map(
        (answer) => (answer as PromiseFulfilledResult<QueryResult>).value.rows as Record<string, unknown>[],
      )
  } catch (error) {
    await client.query('ROLLBACK').catch(() => undefined)
    throw error
  } finally {
    client.release()
  }
}

function send(client: PoolClient, groupId: string, questions: readonly Question[]): Promise<QueryResult>[] {
  inOneWrite(client)
  return [
    client.query(BEGIN),
    client.query({ ...SET_GROUP, values: [groupId] }),
    ...questions.map(({ statement, values }) => client.query({ ...statement, values: [...values] })),
    client.query('COMMIT'),
  ]
}
