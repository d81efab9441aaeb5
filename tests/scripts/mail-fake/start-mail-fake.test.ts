import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { createTransport, type SendMailOptions } from 'nodemailer'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { startMailFake, type Mail, type MailFake } from '../../../scripts/mail-fake/start-mail-fake.ts'

// Processes and linters take their time on a busy machine.
vi.setConfig({ testTimeout: 60_000 })

let folder: string
let fake: MailFake

beforeEach(async () => {
  folder = mkdtempSync(join(tmpdir(), 'halyard-mail-test-'))
  fake = await startMailFake({ folder })
})

afterEach(async () => {
  await fake.stop()
  rmSync(folder, { recursive: true, force: true })
})

const message = {
  from: 'Halyard <halyard@localhost>',
  to: 'river@example.org',
  subject: 'Due <soon> & "overdue"',
  text: 'See https://example.org/items?a=1&b=2.',
  html: '<p>See <a href="https://example.org/items">the item</a><script>alert(1)</script></p>',
  headers: { 'List-Unsubscribe': '<https://example.org/u/1>' },
}

async function send(overrides: SendMailOptions = {}): Promise<void> {
  const transport = createTransport(`${fake.smtpUrl}?socketTimeout=1500&greetingTimeout=1000`)
  try {
    await transport.sendMail({ ...message, ...overrides })
  } finally {
    transport.close()
  }
}

const get = (path: string, headers: Record<string, string> = {}) =>
  fetch(`${fake.pageUrl}${path}`, { headers })

describe('mails', () => {
  it('keeps parts, headers and who it was delivered to', async () => {
    await send({ bcc: 'quiet@example.org' })
    expect(fake.mails()).toMatchObject([
      {
        deliveredTo: ['river@example.org', 'quiet@example.org'],
        subject: message.subject,
        text: message.text,
        html: expect.stringContaining('the item') as string,
        headers: { 'list-unsubscribe': '<https://example.org/u/1>' },
      },
    ])
  })

  it('shows after a restart what came before', async () => {
    await send()
    await fake.stop()
    fake = await startMailFake({ folder })
    expect(fake.mails().map((mail) => mail.subject)).toEqual([message.subject])
  })

  it('waits for a mail that is still to come', async () => {
    const coming = fake.waitForMail((mail) => mail.subject === 'Later')
    await send({ subject: 'Sooner' })
    await send({ subject: 'Later' })
    expect((await coming).subject).toBe('Later')
  })

  it('says what came instead of the mail waited for', async () => {
    await send({ subject: 'Sooner' })
    await expect(fake.waitForMail((mail) => mail.subject === 'Later', 50)).rejects.toThrow(/river.*Sooner/)
  })
})

describe('page', () => {
  it('lists mails with their text escaped', async () => {
    await send()
    const page = await (await get('/')).text()
    expect(page).toContain('Due &lt;soon&gt; &amp; &quot;overdue&quot;')
  })

  it('links addresses in the text part and frames the HTML part in a sandbox', async () => {
    await send()
    const page = await (await get(`/mails/${fake.mails()[0]?.id}`)).text()
    expect(page).toContain('<a href="https://example.org/items?a=1&amp;b=2"')
    expect(page).toContain('<iframe title="HTML part of the mail" sandbox="allow-popups')
    expect(page).not.toContain('<script>')
  })

  it('serves the HTML part under a policy that runs no script and asks nobody', async () => {
    await send()
    const policy = (await get(`/mails/${fake.mails()[0]?.id}/html`)).headers.get('content-security-policy')
    expect(policy).toMatch(/^sandbox allow-popups allow-popups-to-escape-sandbox; default-src 'none'/)
  })

  it('gives the mails as JSON', async () => {
    await send()
    const mails = (await (await get('/api/mails')).json()) as Mail[]
    expect(mails.map((mail) => mail.subject)).toEqual([message.subject])
  })

  it('answers 404 for a mail that is not there', async () => {
    expect((await get('/mails/1-2-3')).status).toBe(404)
  })
})

describe('faults', () => {
  it.each([
    ['defer', 451],
    ['refuse', 550],
  ] as const)('answers %s with %i and keeps nothing', async (behaviour, responseCode) => {
    fake.answerWith(behaviour)
    await expect(send()).rejects.toMatchObject({ responseCode })
    expect(fake.mails()).toEqual([])
  })

  it('hangs up after it has taken the message', async () => {
    fake.answerWith('hang-up-after-data')
    await expect(send()).rejects.toThrow()
    expect(fake.mails()).toHaveLength(1)
  })

  it('never greets', async () => {
    fake.answerWith('never-greet')
    await expect(send()).rejects.toThrow(/greeting/i)
  })

  it('accepts again once told to', async () => {
    fake.answerWith('refuse')
    await send().catch(() => undefined)
    fake.answerWith('accept')
    await send()
    expect(fake.mails()).toHaveLength(1)
  })
})
