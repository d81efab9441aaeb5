import pg from 'pg'
import type { Logger } from 'pino'

interface Hearing {
  readonly url: string
  /** What the connection is for, as PostgreSQL and the log name it. */
  readonly name: string
  readonly channels: readonly string[]
  readonly log: Logger
  onMessage(channel: string, payload: string): void
  /** After every connection: what was told before it was not heard. */
  onConnected(): void
}

const RETRY_MS = [500, 1000, 2000, 5000] as const

/**
 * One connection that listens, made again whenever it is lost. It asks nothing of the pool: a listener must not be a
 * connection that others get.
 */
export class Listener {
  #client: pg.Client | undefined
  #retry: NodeJS.Timeout | undefined
  #failures = 0
  #open = false

  constructor(private readonly hearing: Hearing) {}

  get isConnected(): boolean {
    return this.#client !== undefined
  }

  open(): void {
    if (this.#open) return
    this.#open = true
    this.#failures = 0
    void this.#connect()
  }

  close(): void {
    this.#open = false
    clearTimeout(this.#retry)
    const client = this.#client
    this.#client = undefined
    client?.end().catch(() => undefined)
  }

  /**
   * A question over the listening connection: an answer shows that it is alive. A question without an answer loses it.
   */
  async ask<Row extends pg.QueryResultRow>(text: string, values: readonly unknown[]): Promise<Row[] | null> {
    const client = this.#client
    if (!client) return null
    try {
      return (await client.query<Row>(text, [...values])).rows
    } catch (error) {
      this.#lost(client, error)
      return null
    }
  }

  async #connect(): Promise<void> {
    const { hearing } = this
    const client = new pg.Client({
      connectionString: hearing.url,
      application_name: `halyard-${hearing.name}`,
      options: '-c role=halyard_app',
      connectionTimeoutMillis: 3000,
      query_timeout: 5000,
      keepAlive: true,
    })
    client.on('error', (error) => this.#lost(client, error))
    client.on('notification', ({ channel, payload }) => hearing.onMessage(channel, payload ?? ''))
    try {
      await client.connect()
      if (!this.#open) return void client.end().catch(() => undefined)
      for (const channel of hearing.channels) await client.query(`LISTEN ${channel}`)
      if (!this.#open) return void client.end().catch(() => undefined)
      this.#client = client
      this.#failures = 0
      hearing.onConnected()
    } catch (error) {
      this.#lost(client, error)
    }
  }

  #lost(client: pg.Client, error: unknown): void {
    client.removeAllListeners('notification')
    client.end().catch(() => undefined)
    if (this.#client !== undefined && this.#client !== client) return
    this.#client = undefined
    if (!this.#open) return
    const wait = RETRY_MS[Math.min(this.#failures, RETRY_MS.length - 1)]
    if (this.#failures === 0)
      this.hearing.log.warn({ err: error }, `${this.hearing.name}: listening again soon`)
    this.#failures += 1
    clearTimeout(this.#retry)
    this.#retry = setTimeout(() => void this.#connect(), wait)
    this.#retry.unref()
  }
}
