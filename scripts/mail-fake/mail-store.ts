import { mkdirSync, readdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { parseMail, withEnvelope, type Mail } from './mail.ts'

/** Keeps each message in memory and as one `.eml` file, so that a restart still shows it. */
export class MailStore {
  readonly #folder: string
  #mails: Mail[] = []
  #count = 0

  private constructor(folder: string) {
    this.#folder = folder
  }

  static async open(folder: string): Promise<MailStore> {
    mkdirSync(folder, { recursive: true, mode: 0o700 })
    const store = new MailStore(folder)
    const files = readdirSync(folder).filter((name) => name.endsWith('.eml'))
    for (const name of files.sort()) {
      store.#mails.push(await parseMail(name.slice(0, -'.eml'.length), readFileSync(join(folder, name))))
    }
    return store
  }

  /** Oldest first. */
  get mails(): readonly Mail[] {
    return this.#mails
  }

  async add(deliveredTo: readonly string[], message: Buffer): Promise<Mail> {
    const id = `${Date.now()}-${process.pid}-${String(++this.#count).padStart(6, '0')}`
    const file = withEnvelope(deliveredTo, message)
    const path = join(this.#folder, `${id}.eml`)
    writeFileSync(`${path}.part`, file, { mode: 0o600 })
    renameSync(`${path}.part`, path)
    const mail = await parseMail(id, file)
    this.#mails.push(mail)
    return mail
  }

  find(id: string): Mail | undefined {
    return this.#mails.find((mail) => mail.id === id)
  }

  /** Forgets what came so far; the files stay. */
  forget(): void {
    this.#mails = []
  }
}
