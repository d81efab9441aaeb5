import type { Server } from 'node:http'
import type { AppContext } from './context.ts'

/** What is still running then is cut, so that we end within 10 s (promise P32). */
const LONGEST_MS = 9000

interface Part {
  stop(): Promise<void> | void
}

/** Ends the process in order: no new connections, running requests end, then jobs and streams, then the database. */
export class Shutdown {
  readonly #parts: Part[] = []
  #begun = false

  constructor(
    private readonly ctx: AppContext,
    private readonly server: Server,
  ) {}

  get isBegun(): boolean {
    return this.#begun
  }

  /** Stopped while requests drain; a part that is added after the end has begun is stopped at once. */
  async add(part: Part): Promise<void> {
    if (this.#begun) await part.stop()
    else this.#parts.push(part)
  }

  async run(signal: string): Promise<void> {
    if (this.#begun) return
    this.#begun = true
    const { log, db } = this.ctx
    log.info({ signal }, 'stopping')
    const cut = setTimeout(() => this.server.closeAllConnections(), LONGEST_MS)
    await Promise.allSettled([this.#drain(), ...this.#parts.map(async (part) => part.stop())])
    clearTimeout(cut)
    if (db.isInitialized) await db.destroy().catch((error: unknown) => log.warn({ err: error }, 'database'))
    log.info('stopped')
  }

  /** Keep-alive connections are closed as soon as they fall idle. */
  async #drain(): Promise<void> {
    const sweep = setInterval(() => this.server.closeIdleConnections(), 100)
    await new Promise<void>((resolve) => this.server.close(() => resolve()))
    clearInterval(sweep)
  }
}
