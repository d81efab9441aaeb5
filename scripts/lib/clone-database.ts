import { randomBytes } from 'node:crypto'
import pg from 'pg'
import { withDatabase, type TestPg } from './test-cluster.ts'

export interface TestDatabase {
  name: string
  /** For the owner: may change the schema, passes row-level security only as far as its policies say. */
  ownerUrl: string
  /** For the application's role. */
  appUrl: string
  /** Ends whatever is still connected. */
  drop(): Promise<void>
}

/** A database of the caller's own, copied from `template`; with none, an empty one. */
export async function cloneDatabase(testPg: TestPg, template = 'template1'): Promise<TestDatabase> {
  const name = `t_${process.pid}_${randomBytes(6).toString('hex')}`
  await runAsOwner(testPg, `CREATE DATABASE ${name} TEMPLATE ${template}`)
  return {
    name,
    ownerUrl: withDatabase(testPg.ownerUrl, name),
    appUrl: withDatabase(testPg.appUrl, name),
    drop: () => runAsOwner(testPg, `DROP DATABASE IF EXISTS ${name} WITH (FORCE)`),
  }
}

async function runAsOwner(testPg: TestPg, sql: string): Promise<void> {
  const client = new pg.Client({ connectionString: withDatabase(testPg.ownerUrl, 'postgres') })
  await client.connect()
  try {
    await client.query(sql)
  } finally {
    await client.end()
  }
}
