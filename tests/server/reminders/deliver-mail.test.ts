/** Mail goes out once, is never lost, and slows nobody down (promises P10 and P30). */
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { startJobs } from '#server/jobs/index.ts'
import { deliverMail, sweepMail } from '#server/services/deliver-mail.ts'
import { smtpTransport, type MailTransport } from '#server/services/mail-transport.ts'
import { queueMail } from '#server/services/queue-mail.ts'
import { startTestMailFake, type MailFake } from '../../support/mail-fake.ts'
import { startTestApp, type TestApp, type TestGroup } from '../../support/test-app.ts'

describe('the mail outbox', () => {
  let app: TestApp
  let fake: MailFake
  let transport: MailTransport
  let group: TestGroup

  beforeAll(async () => {
    fake = await startTestMailFake()
    app = await startTestApp()
    transport = smtpTransport(fake.smtpUrl)
    group = await app.givenGroup('Mailing group')
  })
  beforeEach(() => {
    fake.forget()
    fake.answerWith('accept')
  })
  afterAll(async () => {
    transport.close()
    await app.close()
    await fake.stop()
  })

  const queue = (subject: string, recipient = 'lupe@example.org') =>
    app.inGroup(group, (tx) =>
      queueMail(tx, { recipient, subject, text: `Plain ${subject}`, html: `<p>Rich ${subject}</p>` }),
    )
  const deliver = (mailId: string) => deliverMail(app.ctx, transport, { groupId: group.id, mailId })

  it('delivers a mail with both parts and our own Message-ID', async () => {
    const id = await queue('first light')
    await deliver(id)
    const mail = await fake.waitForMail(({ subject }) => subject === 'first light')
    expect(mail.text).toContain('Plain first light')
    expect(mail.html).toContain('Rich first light')
    expect(mail.messageId).toBe(`<${id}@halyard.invalid>`)
    expect(mail.deliveredTo).toEqual(['lupe@example.org'])
  })

  it('sends it once, though two workers take it at the same moment and later again', async () => {
    const id = await queue('only once')
    await Promise.all([deliver(id), deliver(id), deliver(id)])
    app.clock.advance(2, 'hours')
    await sweepMail(app.ctx, transport)
    expect(fake.mails().filter(({ subject }) => subject === 'only once')).toHaveLength(1)
  })

  it('tries again with a growing pause while the server is busy, and delivers when it is back', async () => {
    fake.answerWith('defer')
    const id = await queue('patience')
    await deliver(id)
    await sweepMail(app.ctx, transport)
    expect(await tries(id)).toBe(1)
    app.clock.advance(1, 'minutes')
    await sweepMail(app.ctx, transport)
    expect(await tries(id)).toBe(2)
    fake.answerWith('accept')
    app.clock.advance(15, 'minutes')
    await sweepMail(app.ctx, transport)
    await fake.waitForMail(({ subject }) => subject === 'patience')
  })

  it('stops at an address that is refused for good three times and shows it to the administrator', async () => {
    fake.answerWith('refuse')
    const id = await queue('no such person', 'gone@example.org')
    await deliver(id)
    for (let time = 0; time < 5; time += 1) {
      app.clock.advance(20, 'minutes')
      await sweepMail(app.ctx, transport)
    }
    expect(await tries(id)).toBe(3)
    const admin = await app.givenMember(group, { roles: ['administrator'] })
    const { body } = await admin.get('/api/v1/undelivered')
    expect(body.mails).toContainEqual(
      expect.objectContaining({ recipient: 'gone@example.org', tries: 3, givenUpAt: expect.any(String) }),
    )
  })

  it('is sent a second time with the same Message-ID where the server took it and hid its answer', async () => {
    fake.answerWith('hang-up-after-data')
    const id = await queue('swallowed answer')
    await deliver(id)
    fake.answerWith('accept')
    app.clock.advance(20, 'minutes')
    await sweepMail(app.ctx, transport)
    app.clock.advance(20, 'minutes')
    await sweepMail(app.ctx, transport)
    const copies = fake.mails().filter(({ subject }) => subject === 'swallowed answer')
    expect(copies.map(({ messageId }) => messageId)).toEqual(Array(2).fill(`<${id}@halyard.invalid>`))
  })

  it('is sent by a worker soon after the transaction that caused it', async () => {
    const jobs = await startJobs(app.ctx, smtpTransport(fake.smtpUrl))
    try {
      await queue('by the worker')
      await fake.waitForMail(({ subject }) => subject === 'by the worker')
    } finally {
      await jobs.stop()
    }
  })

  it('goes out without a pause when one transaction queues more than a worker takes at a time', async () => {
    // More than three times what is taken at once: with a pause of 5 s after each it would last more than 10 s.
    const count = 170
    const jobs = await startJobs(app.ctx, smtpTransport(fake.smtpUrl))
    try {
      await app.inGroup(group, async (tx) => {
        for (let at = 0; at < count; at += 1)
          await queueMail(tx, { recipient: 'lupe@example.org', subject: 'a crowd', text: 'x', html: 'x' })
      })
      const sent = () => fake.mails().filter(({ subject }) => subject === 'a crowd').length
      await expect.poll(sent, { timeout: 9000 }).toBe(count)
    } finally {
      await jobs.stop()
    }
  }, 20_000)

  it('is not sent when its transaction fails', async () => {
    const failing = app.inGroup(group, async (tx) => {
      await queueMail(tx, { recipient: 'lupe@example.org', subject: 'never', text: 'x', html: 'x' })
      throw new Error('the cause is undone')
    })
    await expect(failing).rejects.toThrow('undone')
    await sweepMail(app.ctx, transport)
    expect(fake.mails().some(({ subject }) => subject === 'never')).toBe(false)
  })

  async function tries(id: string): Promise<number> {
    const [row] = await app.inGroup(group, (tx) =>
      tx.manager.query<{ tries: number }[]>('SELECT tries FROM mail WHERE id = $1', [id]),
    )
    return row!.tries
  }
})
