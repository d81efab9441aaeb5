import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { startMailFake, type MailFake } from '../../scripts/mail-fake/start-mail-fake.ts'

export type { Mail, MailFake } from '../../scripts/mail-fake/start-mail-fake.ts'

/** A mail fake of the test's own on free ports, whose files are gone when it stops. */
export async function startTestMailFake(): Promise<MailFake> {
  const folder = mkdtempSync(join(tmpdir(), 'halyard-mails-'))
  const fake = await startMailFake({ folder })
  return {
    ...fake,
    stop: async () => {
      await fake.stop()
      rmSync(folder, { recursive: true, force: true })
    },
  }
}
