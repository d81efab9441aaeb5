import { createWriteStream, type WriteStream } from 'node:fs'
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
  /** Gets every line that the server writes. */
  logPath: string
  /** Called with the message of each logged error. */
  onError?: (message: string) => void
  /** Called at once with the process, so that it can be stopped before it listens. */
  onStarted?: (child: Child) => void
}

/** Pino's number for `error`. */
const ERROR_LEVEL = 50

/** How many of its last lines on standard error are told when the server ends. */
const LAST_LINES = 20

/** Starts the built server and resolves once it listens; rejects with what it last said when it ends instead. */
export async function startProductServer(options: ProductOptions): Promise<ProductServer> {
  const child = startChild('node', ['dist-server/main.js'], {
    cwd: root,
    env: { ...process.env, ...options.env },
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  options.onStarted?.(child)
  const log = createWriteStream(options.logPath, { flags: 'a', mode: 0o600 })
  const lastWords = keepLastWords(child, log)
  const port = await new Promise<number>((resolve, reject) => {
    followLog({ child, log, onError: options.onError, onListening: resolve })
    void child.ended.then((code) => {
      log.end()
      reject(new ServerEnded(code, lastWords))
    })
  })
  return { port, child }
}

/** The server ended before it listened: `exitCode` 78 is a wrong setting. */
export class ServerEnded extends Error {
  constructor(
    readonly exitCode: number,
    lastWords: readonly string[] = [],
  ) {
    super([`The server ended with exit code ${exitCode}.`, ...lastWords].join('\n'))
  }
}

function keepLastWords(child: Child, log: WriteStream): string[] {
  const words: string[] = []
  eachLine(child.process.stderr, (line) => {
    log.write(`${line}\n`)
    words.push(line)
    if (words.length > LAST_LINES) words.shift()
  })
  return words
}

interface Following {
  child: Child
  log: WriteStream
  onError?: (message: string) => void
  onListening: (port: number) => void
}

function followLog({ child, log, onError, onListening }: Following): void {
  eachLine(child.process.stdout, (line) => {
    log.write(`${line}\n`)
    const entry = readEntry(line)
    if (entry.msg === 'listening') onListening(Number(entry.port))
    if (Number(entry.level) >= ERROR_LEVEL) onError?.(String(entry.msg))
  })
}

function eachLine(stream: NodeJS.ReadableStream | null, use: (line: string) => void): void {
  if (!stream) throw new Error('The server has no output to read.')
  createInterface({ input: stream }).on('line', use)
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
export function startProgram(program: string, env: ProductEnv, options: readonly string[] = []): Child {
  return startChild('node', ['--import', 'tsx', join(root, program), ...options], {
    cwd: root,
    env: { ...process.env, ...env },
  })
}
