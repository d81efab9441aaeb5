import pg from 'pg'
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { poolOf } from '#server/pool.ts'
import { seedDemo } from '../../../scripts/demo/seed.ts'
import { holdsAGroup, removeUnfinished } from '../../../scripts/demo/unfinished.ts'
import { startProgram } from '../../../scripts/lib/product-server.ts'
import { D0, LOADING_MS } from '../../support/demo.ts'
import { failStatement } from '../../support/failing-statement.ts'
import { startTestApp, type TestApp } from '../../support/test-app.ts'
import { TEST_SECRET } from '../../support/test-client.ts'
import { createDemoDatabase, type TestDatabase } from '../../support/test-database.ts'

describe('a loading that fails on its way', () => {
  let app: TestApp
  let owner: pg.Client

  beforeEach(async () => {
    app = await startTestApp()
    owner = new pg.Client({ connectionString: app.database!.ownerUrl })
    await owner.connect()
    const injection = failStatement(app, 200)
    await expect(seedDemo(app.ctx, { asOf: D0 })).rejects.toThrow(/Step \d+ of the demo/)
    injection.stop()
  })
  afterEach(async () => {
    await owner.end()
    await app.close()
  })

  const openGroups = async () => (await poolOf(app.ctx.db).query('SELECT id FROM list_groups()')).rows

  it('leaves a group that nobody can see', async () => {
    expect(await openGroups()).toEqual([])
    expect(await holdsAGroup(owner)).toBe(false)
  })

  it('is removed without a trace before the next one', async () => {
    expect(await removeUnfinished(owner)).toBe(true)
    for (const table of ['groups', 'member', 'place', 'kit', 'audit_event']) {
      expect((await owner.query(`SELECT FROM ${table}`)).rowCount, table).toBe(0)
    }
    const { rows } = await owner.query<{ last: string }>(`SELECT last_value AS last FROM tag_serial`)
    expect(rows).toEqual([{ last: '1' }])
    expect(await removeUnfinished(owner)).toBe(false)
  })

  it('is left alone beside a group that is in use', async () => {
    await app.givenGroup('Hillside')
    expect(await holdsAGroup(owner)).toBe(true)
    expect(await removeUnfinished(owner)).toBe(false)
    expect(await openGroups()).toHaveLength(1)
  })
})

describe('a database that holds a group', () => {
  let database: TestDatabase
  beforeAll(async () => void (database = await createDemoDatabase(D0)), LOADING_MS)
  afterAll(() => database.drop())

  it('is left as it is, with success', async () => {
    const owner = new pg.Client({ connectionString: database.ownerUrl })
    await owner.connect()
    const audited = async () => (await owner.query('SELECT max(id) AS last FROM audit_event')).rows
    const before = await audited()
    const again = startProgram('scripts/seed-demo.ts', {
      NODE_ENV: 'test',
      PORT: '0',
      PUBLIC_URL: 'http://localhost',
      DATABASE_URL: database.appUrl,
      DATABASE_OWNER_URL: database.ownerUrl,
      SMTP_URL: 'smtp://127.0.0.1:9',
      SESSION_SECRET: TEST_SECRET,
    })
    expect(await again.ended).toBe(0)
    expect(await audited()).toEqual(before)
    await owner.end()
  }, 60_000)
})
