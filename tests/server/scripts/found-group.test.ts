import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { poolOf } from '#server/pool.ts'
import { foundGroupWithAdministrator, readNewGroup } from '../../../scripts/lib/new-group.ts'
import { failStatement } from '../../support/failing-statement.ts'
import { startTestApp, type TestApp } from '../../support/test-app.ts'

const OPTIONS = { name: 'Hillside Radio Group', zone: 'Europe/Paris', admin: 'Ada', email: 'ada@example.org' }

describe('founding a group', () => {
  let app: TestApp
  beforeAll(async () => void (app = await startTestApp()))
  afterAll(() => app.close())

  it('makes the group with an administrator whose invitation is queued', async () => {
    const id = await foundGroupWithAdministrator(app.ctx, readNewGroup(OPTIONS))
    const { members, mails } = await app.inGroup({ id }, async (tx) => ({
      members: await tx.manager.query<{ name: string; roles: string[] }[]>('SELECT name, roles FROM member'),
      mails: await tx.manager.query<{ recipient: string }[]>('SELECT recipient FROM mail'),
    }))
    expect(members).toEqual([{ name: 'Ada', roles: ['administrator', 'quartermaster'] }])
    expect(mails).toEqual([{ recipient: 'ada@example.org' }])
  })

  it('leaves nothing behind, whichever statement fails', async () => {
    const again = readNewGroup({ ...OPTIONS, name: 'Second group' })
    for (let nth = 1; ; nth += 1) {
      const injection = failStatement(app, nth)
      const outcome = await foundGroupWithAdministrator(app.ctx, again).catch(() => 'failed')
      injection.stop()
      if (injection.failed === undefined) break
      expect([injection.failed, outcome]).toEqual([injection.failed, 'failed'])
      expect(nth).toBeLessThan(50)
      const { rows } = await poolOf(app.ctx.db).query('SELECT id FROM list_groups()')
      expect(rows).toHaveLength(1)
    }
  })

  it('names every option at fault', () => {
    expect(() => readNewGroup({ ...OPTIONS, zone: 'Mars/Olympus', email: 'nobody' })).toThrow(
      /--zone.*\n?.*--email/s,
    )
  })
})
