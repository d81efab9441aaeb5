/** Two layers keep groups apart (promise P13); here each is shown to do so without the other. */
import { DataSource } from 'typeorm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { entities } from '#server/entities/index.ts'
import { Member } from '#server/entities/Member.ts'
import { GroupRepository } from '#server/group-repository.ts'
import { asOwner } from '../../support/audit-entries.ts'
import { givenRecords } from '../../support/group-records.ts'
import { readOperations } from '../../support/operations.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'
import { ROLES } from '#shared/contracts/roles.ts'

/** Tables of the deployment: they hold nothing of a group but what a session needs to begin. */
const SHARED_TABLES = ['migrations', 'rate_limit', 'session']

interface TableRow {
  name: string
  column: string | null
  secured: boolean
  forced: boolean
  owner: string
}

let app: TestApp
let one: TestGroup
let other: TestGroup
let member: TestMember
let tables: TableRow[]

beforeAll(async () => {
  app = await startTestApp()
  const operations = await readOperations(app)
  one = await app.givenGroup('One')
  other = await app.givenGroup('Other')
  for (const group of [one, other]) {
    member = await app.givenMember(group, { roles: ROLES })
    await givenRecords(app, { operations, by: member })
  }
  tables = await asOwner<TableRow>(
    app,
    `SELECT c.relname AS name, c.relrowsecurity AS secured, c.relforcerowsecurity AS forced,
      pg_get_userbyid(c.relowner) AS owner,
      (SELECT attname FROM pg_attribute a WHERE a.attrelid = c.oid AND NOT a.attisdropped
        AND (a.attname = 'group_id' OR (c.relname = 'groups' AND a.attname = 'id'))) AS column
     FROM pg_class c WHERE c.relnamespace = 'public'::regnamespace AND c.relkind IN ('r', 'p') ORDER BY 1`,
  )
})
afterAll(() => app.close())

const ofGroups = () => tables.filter(({ column }) => column !== null)

describe('row-level security', () => {
  it('is on and forced for every table with a group', () => {
    expect(ofGroups().filter(({ secured, forced }) => !secured || !forced)).toEqual([])
    expect(ofGroups().length).toBeGreaterThan(20)
  })

  it('leaves no table without a group but the ones of the deployment', () => {
    const rest = tables.filter(({ column }) => column === null).map(({ name }) => name)
    expect(rest).toEqual(SHARED_TABLES)
  })

  it('binds the application, which is neither owner nor superuser', async () => {
    const [role] = await app.ctx.db.query<{ name: string; strong: boolean }[]>(
      `SELECT current_user AS name, rolsuper OR rolbypassrls OR rolcreaterole AS strong
       FROM pg_roles WHERE rolname = current_user`,
    )
    expect(role).toEqual({ name: 'halyard_app', strong: false })
    expect(tables.filter(({ owner }) => owner === 'halyard_app')).toEqual([])
  })

  it('gives no rows at all where no group is set', async () => {
    for (const { name } of ofGroups()) {
      const rows = await app.ctx.db.query<unknown[]>(`SELECT 1 FROM ${name}`).catch(() => [])
      expect([name, rows.length]).toEqual([name, 0])
    }
  })

  it('gives the rows of one group where its id is set, whatever the query says', async () => {
    for (const { name, column } of ofGroups()) {
      const mine = await app.inGroup(one, (tx) =>
        tx.sql<{ own: boolean }>({ name: '', text: `SELECT ${column} = $1 AS own FROM ${name}` }, [one.id]),
      )
      expect([name, mine.every(({ own }) => own)]).toEqual([name, true])
    }
  })

  it('lets no row of another group be written, changed or removed', async () => {
    const inOther = (text: string) =>
      app.inGroup(one, (tx) => tx.sql({ name: '', text: `${text} RETURNING 1` }, [other.id]))
    await expect(
      inOther(
        `INSERT INTO member (id, group_id, name, roles, created_at)
         VALUES (gen_random_uuid(), $1, 'Intruder', '{volunteer}', now())`,
      ),
    ).rejects.toMatchObject({ code: '42501' })
    await expect(inOther('UPDATE member SET group_id = $1')).rejects.toMatchObject({ code: '42501' })
    expect(await inOther(`UPDATE member SET name = 'Changed' WHERE group_id = $1`)).toEqual([])
    expect(await inOther('DELETE FROM credential WHERE group_id = $1')).toEqual([])
  })

  it('ends with the transaction that set the group', async () => {
    await app.inGroup(one, (tx) => tx.sql({ name: '', text: 'SELECT 1' }))
    const [row] = await app.ctx.db.query<{ id: string }[]>(
      `SELECT current_setting('halyard.group_id', true) AS id`,
    )
    expect(row?.id ?? '').toBe('')
  })
})

describe('the query filter', () => {
  it('alone keeps groups apart where row-level security lets everything through', async () => {
    const owner = new DataSource({ type: 'postgres', url: app.database?.ownerUrl, entities })
    await owner.initialize()
    try {
      const all = owner.getRepository(Member)
      expect(new Set((await all.find()).map(({ groupId }) => groupId)).size).toBe(2)
      const mine = new GroupRepository(all, one.id)
      const found = [...(await mine.findBy({})), ...(await mine.query('m').getMany())]
      expect(found.length).toBeGreaterThan(1)
      expect(found.every(({ groupId }) => groupId === one.id)).toBe(true)
      expect(await mine.findOneBy({ id: member.memberId })).toBeNull()
      expect(await mine.countBy({ id: member.memberId })).toBe(0)
      expect(await mine.update({ id: member.memberId }, { name: 'Changed' })).toBe(0)
      expect(await mine.findOneBy({ groupId: other.id, id: member.memberId })).toBeNull()
      const made = await mine.insert({
        id: '0190a000-0000-7000-8000-000000000001',
        groupId: other.id,
        name: 'Mine after all',
        roles: ['volunteer'],
        createdAt: new Date(0),
      })
      expect(made.groupId).toBe(one.id)
    } finally {
      await owner.destroy()
    }
  })
})

describe('the audit log', () => {
  it('is added to by the application, never changed (P40)', async () => {
    const attempt = (text: string) => app.inGroup(one, (tx) => tx.sql({ name: '', text }))
    for (const text of [
      'UPDATE audit_event SET actor = NULL',
      'DELETE FROM audit_event',
      'TRUNCATE audit_event',
    ])
      await expect(attempt(text)).rejects.toMatchObject({ code: '42501' })
    const entries = await app.inGroup(one, (tx) =>
      tx.sql<{ own: boolean }>({ name: '', text: 'SELECT group_id = $1 AS own FROM audit_event' }, [one.id]),
    )
    expect(entries.length).toBeGreaterThan(0)
    expect(entries.every(({ own }) => own)).toBe(true)
  })
})
