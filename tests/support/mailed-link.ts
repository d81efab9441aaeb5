import { asOwner } from './audit-entries.ts'
import type { TestApp } from './test-app.ts'

export interface MailRow {
  recipient: string
  subject: string
  text_body: string
  html_body: string
  headers: Record<string, string>
}

/** Queued mails to an address, oldest first. */
export function mailsTo(app: TestApp, recipient: string): Promise<MailRow[]> {
  return asOwner<MailRow>(app, 'SELECT * FROM mail WHERE recipient = $1 ORDER BY id', [recipient])
}

/** The link of the newest mail to an address, and its token. */
export async function mailedLink(app: TestApp, recipient: string): Promise<{ link: string; token: string }> {
  const mail = (await mailsTo(app, recipient)).at(-1)
  const link = /https?:\S+/.exec(mail?.text_body ?? '')?.[0] ?? ''
  return { link, token: link.split('#')[1] ?? '' }
}
