/** How long a session holds and what it gives (promises P15 and P20). */
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { Member } from '#server/entities/Member.ts'
import { renewSession } from '#server/services/sessions.ts'
import { poolOf } from '#server/pool.ts'
import { asOwner } from '../../support/audit-entries.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'
import { cookieOf } from '../../support/test-client.ts'

const NOON = '2026-06-01T12:00:00Z'

let app: TestApp
let group: TestGroup
let member: TestMember

beforeAll(async () => {
  app = await startTestApp({ now: NOON })
  group = await app.givenGroup('Ridge Group')
})
afterAll(() => app.close())
beforeEach(async () => {
  app.clock.set(NOON)
  await asOwner(app, 'DELETE FROM session')
  member = await app.givenMember(group, { roles: ['quartermaster', 'volunteer'] })
})

const isSignedIn = async () => {
  const { body } = await member.get('/api/v1/session').expect(200)
  return (body as { member: object | null }).member !== null
}
const onOtherDevice = () =>
  asOwner(app, `UPDATE session SET sess = sess || '{"ownDevice": false}', expire = $1`, [
    '2026-06-01T20:00:00Z',
  ])
const stored = async () => {
  const [row] = await asOwner<{ sid: string; sess: { seenAt: string }; expire: Date }>(
    app,
    'SELECT * FROM session',
  )
  return row!
}

describe('session', () => {
  it('is nobody without a cookie', async () => {
    const { body, headers } = await app.request().get('/api/v1/session').expect(200)
    expect(body).toEqual({ member: null })
    expect(headers['set-cookie']).toBeUndefined()
  })

  it('is nobody with an id that the server never made', async () => {
    member.cookie = cookieOf('a'.repeat(43))
    expect(await isSignedIn()).toBe(false)
  })

  it('is nobody with a signature that is not ours', async () => {
    member.cookie = `${member.cookie?.slice(0, -3)}AAA`
    expect(await isSignedIn()).toBe(false)
  })

  it('holds 30 days without use on a member’s own device', async () => {
    app.clock.advance(30, 'days')
    app.clock.advance(-1, 'seconds')
    expect(await isSignedIn()).toBe(true)
    app.clock.advance(30, 'days')
    expect(await isSignedIn()).toBe(false)
  })

  it('ends after 90 days on a member’s own device, however much it is used', async () => {
    for (let day = 0; day < 90; day += 10) {
      expect(await isSignedIn()).toBe(true)
      await untilRenewed()
      app.clock.advance(10, 'days')
    }
    expect(await isSignedIn()).toBe(false)
  })

  it('ends after 8 h without use on any other device', async () => {
    await onOtherDevice()
    app.clock.advance(8, 'hours')
    expect(await isSignedIn()).toBe(false)
  })

  it('ends after 24 h on any other device, however much it is used', async () => {
    await onOtherDevice()
    for (let hour = 0; hour < 24; hour += 6) {
      expect(await isSignedIn()).toBe(true)
      await untilRenewed()
      app.clock.advance(6, 'hours')
    }
    expect(await isSignedIn()).toBe(false)
  })

  it('writes nothing on a read that follows the last within ten minutes', async () => {
    const before = await stored()
    app.clock.advance(10, 'minutes')
    expect(await isSignedIn()).toBe(true)
    expect(await stored()).toEqual(before)
  })

  it('renews on a read eleven minutes after the last', async () => {
    app.clock.advance(11, 'minutes')
    expect(await isSignedIn()).toBe(true)
    await untilRenewed()
    expect((await stored()).sess.seenAt).toBe('2026-06-01T12:11:00.000Z')
  })

  it('is not brought back by a request that was under way when it ended', async () => {
    const { sid, sess } = await asOwner<{ sid: string; sess: never }>(
      app,
      'SELECT sid, sess FROM session',
    ).then((rows) => rows[0]!)
    await asOwner(app, 'DELETE FROM session')
    await renewSession(poolOf(app.ctx.db), sid, sess, app.clock.now())
    expect(await asOwner(app, 'SELECT 1 FROM session')).toEqual([])
  })

  it('gives the roles of this very request', async () => {
    await change({ roles: ['observer'] })
    const { body } = await member.get('/api/v1/session').expect(200)
    expect(body).toMatchObject({ member: { roles: ['observer'] } })
  })

  it('ends with the membership', async () => {
    await change({ removedAt: app.clock.now() })
    expect(await isSignedIn()).toBe(false)
  })

  it('ends when the group is archived', async () => {
    await asOwner(app, 'UPDATE groups SET archived_at = now()')
    expect(await isSignedIn()).toBe(false)
    await asOwner(app, 'UPDATE groups SET archived_at = NULL')
  })

  it('keeps rights that need a fresh password for one hour', async () => {
    app.clock.advance(1, 'hours')
    const { body } = await member.get('/api/v1/session').expect(200)
    expect(body).toMatchObject({ member: { roles: ['quartermaster', 'volunteer'] } })
  })

  it('holds those rights back after one hour and says which', async () => {
    app.clock.advance(3601, 'seconds')
    const { body } = await member.get('/api/v1/session').expect(200)
    expect(body).toMatchObject({
      member: { roles: ['volunteer'], heldRoles: ['quartermaster', 'volunteer'] },
    })
  })

  it('lets an administrator go on as a member of the crew meanwhile', async () => {
    const administrator = await app.givenMember(group, { roles: ['administrator'] })
    app.clock.advance(2, 'hours')
    await administrator.get('/api/v1/members').expect(200)
    await administrator.get('/api/v1/profile').expect(200)
  })

  it('asks for the password where only a held-back right would do', async () => {
    const administrator = await app.givenMember(group, { roles: ['administrator'] })
    await administrator.get('/api/v1/people').expect(200)
    app.clock.advance(3601, 'seconds')
    const { body } = await administrator.get('/api/v1/people').expect(403)
    expect(body).toMatchObject({ code: 'password-needed' })
    await member
      .get('/api/v1/people')
      .expect(403)
      .expect(/not-allowed/)
  })
})

function change(columns: Partial<Member>): Promise<number> {
  return app.inGroup(group, (tx) => tx.repository(Member).update({ id: member.memberId }, columns))
}

/** The renewal goes on beside the request. */
async function untilRenewed(): Promise<void> {
  const now = app.clock.now().toISOString()
  for (let tries = 0; tries < 100 && (await stored()).sess.seenAt < now; tries += 1)
    await new Promise((resolve) => setTimeout(resolve, 20))
}
