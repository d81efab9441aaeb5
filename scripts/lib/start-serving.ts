import { readFileSync, renameSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import type { Ending } from './ending.ts'
import { holdFirstFree, holdPort, isPortTaken, type HeldPort } from './free-port.ts'
import { ServerEnded, startProductServer, type ProductEnv } from './product-server.ts'

export interface PublicAddress {
  port: number
  url: string
  held: HeldPort
}

/**
 * The port is held until the server itself takes it. It is the one of the last time if it can be, so that links in
 * mails and printed tags keep working.
 */
export async function holdPublicPort(folder: string): Promise<PublicAddress> {
  const host = process.env.HOST ?? '127.0.0.1'
  const held = await holdWantedPort(folder, host)
  const url = process.env.PUBLIC_URL ?? `http://localhost:${held.port}`
  return { port: held.port, url, held }
}

async function holdWantedPort(folder: string, host: string): Promise<HeldPort> {
  const wanted = Number(process.env.PORT ?? 0)
  if (!wanted) return holdFirstFree([lastPort(folder), 8080].filter(Boolean), host)
  return holdPort(wanted, host).catch((error: unknown) => {
    throw isPortTaken(error)
      ? new Error(`Port ${wanted} is taken: name another one in PORT, or none.`)
      : error
  })
}

/** 0 when this is the first start. */
function lastPort(folder: string): number {
  try {
    return Number(new URL(readFileSync(join(folder, 'address'), 'utf8')).port)
  } catch {
    return 0
  }
}

export interface Serving {
  env: ProductEnv
  folder: string
  address: PublicAddress
  ending: Ending
}

/** Starts the server on the held port. When it ends without being asked to, so do we. */
export async function serve({ env, folder, address, ending }: Serving): Promise<void> {
  const logPath = join(folder, 'server.log')
  keepLastLog(logPath)
  await address.held.release()
  const server = await startProductServer({
    env,
    logPath,
    onError: (message) => console.error(`The server reports: ${message} (see ${logPath})`),
    onStarted: (child) => void ending.add(() => child.stop()),
  })
  void server.child.ended.then(async (code) => {
    if (ending.hasBegun) return
    console.error(`${new ServerEnded(code).message} See ${logPath}`)
    await ending.run()
    process.exit(code || 1)
  })
  writeFileSync(join(folder, 'address'), address.url)
}

/** The log of the start before this one stays readable. */
function keepLastLog(path: string): void {
  try {
    renameSync(path, `${path}.1`)
  } catch {
    // The first start has none.
  }
}
