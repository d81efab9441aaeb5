import { createServer, connect, type Server, type Socket } from 'node:net'
import type { AddressInfo } from 'node:net'

/** A way to the database that a test can take away and give back, without harm to the tests beside it. */
export class DatabaseProxy {
  readonly #sockets = new Set<Socket>()
  #server: Server | undefined
  #port = 0
  #isFrozen = false

  private constructor(private readonly target: URL) {}

  static async start(url: string): Promise<DatabaseProxy> {
    const proxy = new DatabaseProxy(new URL(url))
    await proxy.open()
    return proxy
  }

  /** The database's address by way of the proxy. */
  get url(): string {
    const url = new URL(this.target)
    url.hostname = '127.0.0.1'
    url.port = String(this.#port)
    return url.href
  }

  /** Takes connections, on the same port as before. */
  async open(): Promise<void> {
    this.#isFrozen = false
    const server = createServer((client) => this.#join(client))
    this.#server = server
    await new Promise<void>((resolve, reject) => {
      server.once('error', reject)
      server.listen(this.#port, '127.0.0.1', resolve)
    })
    this.#port = (server.address() as AddressInfo).port
  }

  /** The database is gone: connections break and new ones are refused. */
  async cut(): Promise<void> {
    for (const socket of this.#sockets) socket.destroy()
    await new Promise<void>((resolve) => this.#server?.close(() => resolve()))
  }

  /** The database hangs: connections stay, and nothing comes back. */
  freeze(): void {
    this.#isFrozen = true
    for (const socket of this.#sockets) socket.pause()
  }

  thaw(): void {
    this.#isFrozen = false
    for (const socket of this.#sockets) socket.resume()
  }

  #join(client: Socket): void {
    const upstream = connect(Number(this.target.port), this.target.hostname)
    for (const [from, to] of [
      [client, upstream],
      [upstream, client],
    ] as const) {
      this.#sockets.add(from)
      from.on('data', (bytes) => to.write(bytes))
      from.on('error', () => undefined)
      from.on('close', () => {
        this.#sockets.delete(from)
        to.destroy()
      })
      if (this.#isFrozen) from.pause()
    }
  }
}
