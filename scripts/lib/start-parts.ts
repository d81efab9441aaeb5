import { join } from 'node:path'
import { startCluster } from './cluster.ts'
import type { Ending } from './ending.ts'
import { holdFirstFree } from './free-port.ts'
import type { ProductEnv } from './product-server.ts'
import { startMailFake } from '../mail-fake/start-mail-fake.ts'

export type DatabaseEnv = Pick<ProductEnv, 'DATABASE_URL' | 'DATABASE_OWNER_URL'>

/** The database that DATABASE_URL names, else a cluster of our own in `folder`. */
export async function openDatabase(folder: string, ending: Ending): Promise<DatabaseEnv> {
  const given = process.env.DATABASE_URL
  if (given) {
    console.log('Using the database that DATABASE_URL names')
    return { DATABASE_URL: given, DATABASE_OWNER_URL: process.env.DATABASE_OWNER_URL }
  }
  console.log(`Starting PostgreSQL (its data: ${folder})`)
  const cluster = await startCluster({ folder })
  await ending.add(() => cluster.stop())
  void cluster.ended.then(() => {
    if (!ending.hasBegun) console.error(`PostgreSQL ended by itself: see ${join(folder, 'postgres.log')}`)
  })
  return { DATABASE_URL: cluster.url('app'), DATABASE_OWNER_URL: cluster.url('owner') }
}

export interface MailServer {
  smtpUrl: string
  /** Where to read the mails, when they stay on this machine. */
  pageUrl: string | null
}

/** Tried first for the page that shows the mails, so that its address stays the same where it can. */
const MAIL_PAGE_PORT = 8081

/** The mail server that SMTP_URL names, else a fake that keeps what it gets. */
export async function openMail(folder: string, ending: Ending): Promise<MailServer> {
  const given = process.env.SMTP_URL
  if (given) {
    console.log('Sending mail through the server that SMTP_URL names')
    return { smtpUrl: given, pageUrl: null }
  }
  const page = await holdFirstFree([MAIL_PAGE_PORT])
  await page.release()
  const fake = await startMailFake({ folder: join(folder, 'mails'), pagePort: page.port })
  await ending.add(() => fake.stop())
  return { smtpUrl: fake.smtpUrl, pageUrl: fake.pageUrl }
}
