import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { Group } from '#server/entities/Group.ts'
import type { GroupTx, Statement } from '#server/group-transaction.ts'
import { startTestApp, type TestApp, type TestGroup } from '../support/test-app.ts'

const RENAME: Statement = { name: 'test-rename', text: 'UPDATE groups SET short_name = $2 WHERE id = $1' }
const FAIL: Statement = { name: 'test-fail', text: 'SELECT 1 / $1::int' }
const READ: Statement = { name: 'test-read', text: 'SELECT short_name FROM groups WHERE id = $1' }

let app: TestApp
let group: TestGroup

beforeAll(async () => {
  app = await startTestApp()
  group = await app.givenGroup('Ridge Group')
})
afterAll(() => app.close())

const rename = (tx: GroupTx, name: string) => tx.sql(RENAME, [tx.groupId, name])
const fail = (tx: GroupTx) => tx.sql(FAIL, [0])
const shortName = () =>
  app.inGroup(group, async (tx) => (await tx.sql<{ short_name: string }>(READ, [tx.groupId]))[0]?.short_name)

describe('inGroup', () => {
  it('keeps what its work wrote', async () => {
    await app.inGroup(group, (tx) => rename(tx, 'kept'))
    expect(await shortName()).toBe('kept')
  })

  it('takes everything back when its work throws after writing', async () => {
    const work = async (tx: GroupTx) => {
      await rename(tx, 'lost')
      throw new Error('changed my mind')
    }
    await expect(app.inGroup(group, work)).rejects.toThrow('changed my mind')
    expect(await shortName()).toBe('kept')
  })

  it('takes everything back when one of several statements under way fails', async () => {
    const work = (tx: GroupTx) => Promise.all([rename(tx, 'lost'), fail(tx), rename(tx, 'lost too')])
    await expect(app.inGroup(group, work)).rejects.toMatchObject({ code: '22012' })
    expect(await shortName()).toBe('kept')
  })

  it('does not pretend to have kept what a swallowed failure undid', async () => {
    const work = async (tx: GroupTx) => {
      await rename(tx, 'lost')
      await fail(tx).catch(() => undefined)
    }
    await expect(app.inGroup(group, work)).rejects.toThrow('failed before its commit')
    expect(await shortName()).toBe('kept')
  })

  it('does not pretend so when nobody waited for the failing statement', async () => {
    const work = async (tx: GroupTx) => {
      void fail(tx)
      await rename(tx, 'lost').catch(() => undefined)
    }
    await expect(app.inGroup(group, work)).rejects.toThrow('failed before its commit')
    expect(await shortName()).toBe('kept')
  })

  it('leaves a connection that the next transaction can use, in no group', async () => {
    await expect(app.inGroup(group, fail)).rejects.toMatchObject({ code: '22012' })
    const all = await app.ctx.db.query<unknown[]>('SELECT * FROM groups')
    expect(all).toEqual([])
    expect(await shortName()).toBe('kept')
  })

  it('tries again after a deadlock, three times in all', async () => {
    let tries = 0
    const work = async () => {
      tries += 1
      throw Object.assign(new Error('deadlock detected'), { code: '40P01' })
    }
    await expect(app.inGroup(group, work)).rejects.toThrow('deadlock')
    expect(tries).toBe(3)
  })

  it('lets repositories take part in its transaction', async () => {
    const work = async (tx: GroupTx) => {
      await tx.manager.update(Group, { id: tx.groupId }, { shortName: 'lost' })
      await fail(tx)
    }
    await expect(app.inGroup(group, work)).rejects.toMatchObject({ code: '22012' })
    expect(await shortName()).toBe('kept')
  })
})
