import { closeSync, createWriteStream, openSync, type WriteStream } from 'node:fs'
import { join } from 'node:path'
import { createInterface } from 'node:readline'
import { startChild, type Child } from './child.ts'
import { root } from './paths.ts'

/** The settings of `server/config.ts` that we decide; everything else passes through from our own environment. */
export interface ProductEnv {
  NODE_ENV?: 'production' | 'development' | 'test'
  HOST?: string
  PORT: string
  PUBLIC_URL: string
  DATABASE_URL: string
  DATABASE_OWNER_URL?: string
  SMTP_URL: string
  SESSION_SECRET: string
}

export interface ProductServer {
  readonly port: number
  readonly child: Child
}

export interface ProductOptions {
  env: ProductEnv
  /** Gets every line that the server logs. */
  logPath: string
  /** Called with the message of each logged error. */
  onError?: (message: string) => void
  /** Called at once with the process, so that it can be stopped before it listens. */
  onStarted?: (child: Child) => void
}

/** Pino's number for `error`. */
const ERROR_LEVEL = 50

/** Starts the server and resolves once it listens; rejects with what it last said when it ends instead. */
export async function startProductServer({
  env,
  logPath,
  onError,
  onStarted,
}: ProductOptions): Promise<ProductServer> {
  const errors = openSync(logPath, 'a', 0o600)
  const child = startChild('node', ['--import', 'tsx', 'server/main.ts'], {
    cwd: root,
    env: { ...process.env, ...env },
    stdio: ['ignore', 'pipe', errors],
  })
  closeSync(errors)
  onStarted?.(child)
  const log = createWriteStream(logPath, { flags: 'a', mode: 0o600 })
  const port = await whenListening({ child, log, onError })
  return { port, child }
}

interface Watching {
  child: Child
  log: WriteStream
  onError?: (message: string) => void
}

function whenListening({ child, log, onError }: Watching): Promise<number> {
  return new Promise((resolve, reject) => {
    if (!child.process.stdout) throw new Error('The server has no output to read.')
    createInterface({ input: child.process.stdout }).on('line', (line) => {
      log.write(`${line}\n`)
      const entry = readEntry(line)
      if (entry.msg === 'listening') resolve(Number(entry.port))
      if (Number(entry.level) >= ERROR_LEVEL) onError?.(String(entry.msg))
    })
    void child.ended.then((code) => {
      log.end()
      reject(new ServerEnded(code))
    })
  })
}

/** The server ended before it listened: `exitCode` 78 is a wrong setting. */
export class ServerEnded extends Error {
  constructor(readonly exitCode: number) {
    super(`The server ended with exit code ${exitCode}.`)
  }
}

interface LogEntry {
  level?: unknown
  msg?: unknown
  port?: unknown
}

function readEntry(line: string): LogEntry {
  try {
    return JSON.parse(line) as LogEntry
  } catch {
    return {}
  }
}

/** One of our own TypeScript programs with the product's settings; its output goes to ours. */
export function startProgram(program: string, env: ProductEnv): Child {
  return startChild('node', ['--import', 'tsx', join(root, program)], {
    cwd: root,
    env: { ...process.env, ...env },
  })
}
