import type { Mail } from './mail.ts'
import { MailStore } from './mail-store.ts'
import { startPageSide } from './page-side.ts'
import { startSmtpSide, type MailBehaviour } from './smtp-side.ts'

export type { Mail } from './mail.ts'
export type { MailBehaviour } from './smtp-side.ts'

export interface MailFakeOptions {
  /** Where the `.eml` files go. */
  folder: string
  /** 0: any free port. */
  smtpPort?: number
  pagePort?: number
}

/** A mail server on this machine that keeps what it gets and sends nothing on. */
export interface MailFake {
  smtpUrl: string
  pageUrl: string
  /** Oldest first. */
  mails(): readonly Mail[]
  /** The first mail that matches, among those there and those to come; rejects after `patienceMs` (10 s). */
  waitForMail(matches: (mail: Mail) => boolean, patienceMs?: number): Promise<Mail>
  answerWith(behaviour: MailBehaviour): void
  /** Forgets the mails that came so far. */
  forget(): void
  stop(): Promise<void>
}

export async function startMailFake(options: MailFakeOptions): Promise<MailFake> {
  const store = await MailStore.open(options.folder)
  const smtp = await startSmtpSide(store, options.smtpPort ?? 0)
  const page = await startPageSide(store, options.pagePort ?? 0)
  return {
    smtpUrl: `smtp://127.0.0.1:${smtp.port}`,
    pageUrl: `http://127.0.0.1:${page.port}`,
    mails: () => store.mails,
    waitForMail: (matches, patienceMs) => waitForMail(store, matches, patienceMs),
    answerWith: smtp.answerWith,
    forget: () => store.forget(),
    stop: async () => {
      await Promise.all([smtp.stop(), page.stop()])
    },
  }
}

async function waitForMail(
  store: MailStore,
  matches: (mail: Mail) => boolean,
  patienceMs = 10_000,
): Promise<Mail> {
  const deadline = Date.now() + patienceMs
  for (;;) {
    const found = store.mails.find(matches)
    if (found) return found
    if (Date.now() > deadline) {
      const came = store.mails.map((mail) => `${mail.deliveredTo.join(', ')}: ${mail.subject}`)
      throw new Error(`No such mail in ${patienceMs} ms. What came:\n  ${came.join('\n  ') || 'nothing'}`)
    }
    await new Promise((resolve) => setTimeout(resolve, 25))
  }
}
