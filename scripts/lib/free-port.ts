import { createServer, type Server } from 'node:net'

/** A port held until `release()`: nobody else can take it in the meantime. */
export interface HeldPort {
  readonly port: number
  release(): Promise<void>
}

/** Holds `port` (0: any) on `host`; rejects with EADDRINUSE when another program listens there. */
export async function holdPort(port: number, host = '127.0.0.1'): Promise<HeldPort> {
  // A browser that asks meanwhile is turned away: held on to, its connection would keep the port from being released.
  const server = createServer((socket) => socket.destroy())
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject)
    server.listen({ port, host, exclusive: true }, resolve)
  })
  return { port: portOf(server), release: () => close(server) }
}

/** A port that was free a moment ago. The caller must be ready to try another. */
export async function findFreePort(host = '127.0.0.1'): Promise<number> {
  const held = await holdPort(0, host)
  await held.release()
  return held.port
}

/** Holds the first free one of `wanted`, else any. */
export async function holdFirstFree(wanted: readonly number[], host = '127.0.0.1'): Promise<HeldPort> {
  for (const port of wanted) {
    try {
      return await holdPort(port, host)
    } catch (error) {
      if (!isPortTaken(error)) throw error
    }
  }
  return holdPort(0, host)
}

export function isPortTaken(error: unknown): boolean {
  return error instanceof Error && 'code' in error && (error.code === 'EADDRINUSE' || error.code === 'EACCES')
}

function portOf(server: Server): number {
  const address = server.address()
  if (address === null || typeof address === 'string') throw new Error('The server has no port.')
  return address.port
}

function close(server: Server): Promise<void> {
  return new Promise((resolve, reject) => server.close((error) => (error ? reject(error) : resolve())))
}
