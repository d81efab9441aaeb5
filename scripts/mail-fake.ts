// Runs the local mail fake by itself: takes every mail, sends none on, and shows them on a page.
import { join } from 'node:path'
import { stateFolder } from './lib/paths.ts'
import { startMailFake } from './mail-fake/start-mail-fake.ts'

const fake = await startMailFake({
  folder: process.argv[2] ?? join(stateFolder, 'mails'),
  smtpPort: Number(process.env.SMTP_PORT ?? 0),
  pagePort: Number(process.env.PAGE_PORT ?? 0),
})
console.log(`SMTP_URL=${fake.smtpUrl}\nRead the mails at ${fake.pageUrl} (Ctrl-C ends)`)
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) {
  process.once(signal, () => void fake.stop().then(() => process.exit(0)))
}
