/** Reminders come once, also after an outage, and stop by one click (promises P10, P11 and P22). */
import pg from 'pg'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { remindAllGroups } from '#server/services/reminders/morning-reminders.ts'
import { fullCount, givenStation, recorded, type Station } from '../../support/evidence.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'

const CLEAR = 'DELETE FROM reminder; DELETE FROM reminder_run; DELETE FROM mail'

interface QueuedMail {
  recipient: string
  subject: string
  text_body: string
  html_body: string
  headers: Record<string, string>
}

/** 2026-06-01 12:00 UTC is 08:00 in the group's zone: the morning has come. */
describe('morning reminders', () => {
  let app: TestApp
  let group: TestGroup
  let keeper: TestMember
  let holder: TestMember
  let station: Station

  beforeAll(async () => {
    app = await startTestApp({ now: '2025-05-01T12:00:00Z' })
    group = await app.givenGroup('Group of the mornings')
    keeper = await app.givenMember(group, { name: 'Quentin', roles: ['quartermaster', 'administrator'] })
    holder = await app.givenMember(group, { name: 'Holda' })
    await app.givenMember(group, { name: 'Idle' })
    station = await givenStation(keeper, { kit: { responsibleId: holder.memberId } })
    await recorded(keeper, fullCount(station.kit, '2025-05-01T11:00:00Z'))
    app.clock.set('2026-06-01T12:00:00Z')
  })

  beforeEach(() => ownerQuery(app, CLEAR))

  afterAll(() => app.close())

  const mails = () =>
    app.inGroup(group, (tx) =>
      tx.manager.query<QueuedMail[]>(
        'SELECT recipient, subject, text_body, html_body, headers FROM mail ORDER BY recipient',
      ),
    )

  it('mails one message to whoever answers for a kit and the digest to the quartermaster, nobody else', async () => {
    await remindAllGroups(app.ctx)
    expect((await mails()).map(({ recipient }) => recipient).sort()).toEqual(
      [holder.email, keeper.email].sort(),
    )
  })

  it('says what is overdue, what becomes of the kit, and where to act', async () => {
    await remindAllGroups(app.ctx)
    const mail = (await mails()).find(({ recipient }) => recipient === holder.email)!
    expect(mail.subject).toMatch(/^\d+ overdue.*Group of the mornings$/)
    for (const body of [mail.text_body, mail.html_body]) {
      expect(body).toContain(station.kit.designation)
      expect(body).toMatch(/count, was due 1 Nov 2025/i)
      expect(body).toMatch(/(Not proven|Not fit) now/)
      expect(body).toContain(`${app.ctx.config.publicUrl}/kits/${station.kit.id}`)
    }
    expect(mail.headers['List-Unsubscribe-Post']).toBe('List-Unsubscribe=One-Click')
  })

  it('makes the mails of a day once, though two servers begin at the same moment and later again', async () => {
    await Promise.all([remindAllGroups(app.ctx), remindAllGroups(app.ctx)])
    await remindAllGroups(app.ctx)
    expect(await mails()).toHaveLength(2)
  })

  it('leaves nothing behind when it breaks off half way, and makes the mails whole the next time', async () => {
    await ownerQuery(
      app,
      `ALTER TABLE mail ADD CONSTRAINT broken CHECK (recipient <> '${keeper.email}') NOT VALID`,
    )
    await expect(remindAllGroups(app.ctx)).rejects.toThrow()
    expect(await mails()).toHaveLength(0)
    await ownerQuery(app, 'ALTER TABLE mail DROP CONSTRAINT broken')
    await remindAllGroups(app.ctx)
    expect(await mails()).toHaveLength(2)
  })

  it('waits for the morning of the group and makes up a missed one once', async () => {
    app.clock.set('2026-06-02T10:59:00Z')
    await remindAllGroups(app.ctx)
    expect(await mails()).toHaveLength(0)
    app.clock.set('2026-06-04T23:00:00Z')
    await remindAllGroups(app.ctx)
    expect(await mails()).toHaveLength(2)
    app.clock.set('2026-06-01T12:00:00Z')
  })

  it('mails nobody when nothing is due', async () => {
    const quiet = await app.givenGroup('Quiet group')
    await app.givenMember(quiet, { roles: ['quartermaster'] })
    await remindAllGroups(app.ctx)
    const found = await app.inGroup(quiet, (tx) => tx.manager.query<object[]>('SELECT id FROM mail'))
    expect(found).toHaveLength(0)
  })

  it('stops by one click from the mail, without a session or an origin, any number of times', async () => {
    await remindAllGroups(app.ctx)
    const mail = (await mails()).find(({ recipient }) => recipient === holder.email)!
    const path = new URL(mail.headers['List-Unsubscribe']!.slice(1, -1)).pathname
    for (let time = 0; time < 2; time += 1) {
      const response = await fetch(`${app.url}${path}`, {
        method: 'POST',
        body: new URLSearchParams({ 'List-Unsubscribe': 'One-Click' }),
        redirect: 'error',
      })
      expect(response.status).toBe(204)
    }
    await ownerQuery(app, CLEAR)
    await remindAllGroups(app.ctx)
    expect((await mails()).map(({ recipient }) => recipient)).toEqual([keeper.email])
    const link = path.replace('/stop', '')
    const again = await app.request().post(link, { wantsReminders: true })
    expect(again.body).toMatchObject({ memberName: 'Holda', wantsReminders: true })
  })

  it('takes no link that was changed by a character', async () => {
    const path = '/api/v1/reminder-links/' + `${group.id}.${holder.memberId}.${'A'.repeat(43)}`
    expect((await app.request().get(path)).body).toMatchObject({ code: 'link-invalid' })
    expect((await app.request().get('/api/v1/reminder-links/nonsense')).status).toBe(422)
  })
})

/** As the owner of the tables: what the application itself may not do. */
async function ownerQuery(app: TestApp, sql: string): Promise<void> {
  const client = new pg.Client({ connectionString: app.database!.ownerUrl })
  await client.connect()
  await client.query(sql).finally(() => client.end())
}
