import { createApp } from './app.ts'
import { systemClock } from './clock.ts'
import { ConfigError, readConfig, type Config } from './config.ts'
import type { AppContext } from './context.ts'
import { createDataSource } from './data-source.ts'
import { createHttpServer, listen } from './http-server.ts'
import { startJobs } from './jobs/index.ts'
import { boardHub } from './live/board-hub.ts'
import { createLog } from './log.ts'
import { prepareDatabase } from './prepare-database.ts'
import { startHousekeeping } from './services/housekeeping.ts'
import { smtpTransport } from './services/mail-transport.ts'
import { Shutdown } from './shutdown.ts'

/** sysexits.h EX_CONFIG: a wrong setting; starting again does not help. */
const EXIT_CONFIG = 78

/** A last fence: whatever hangs, the process is gone by then (promise P32). */
const LAST_CALL_MS = 9800

async function serve(config: Config): Promise<void> {
  const log = createLog(config.logLevel)
  const db = createDataSource({ url: config.databaseUrl, size: config.databasePool })
  const ctx: AppContext = { config, db, clock: systemClock, log }
  const server = createHttpServer(createApp(ctx))
  const shutdown = new Shutdown(ctx, server)
  endOnSignals(shutdown)
  process.on('unhandledRejection', (error) => log.error({ err: error }, 'unhandled rejection'))

  // Listens once the database is ready, or at once when it is away: then /readyz says so.
  const { ready, away } = beginPreparing(ctx)
  await Promise.race([ready, away])
  log.info({ port: await listen(server, config) }, 'listening')
  await ready
  await startParts(ctx, shutdown).catch((error: unknown) => {
    // Told to end while it began: the database is closed already.
    if (!shutdown.isBegun) throw error
  })
}

function beginPreparing(ctx: AppContext): { ready: Promise<void>; away: Promise<void> } {
  let tellAway = () => {}
  const away = new Promise<void>((resolve) => (tellAway = resolve))
  const ready = prepareDatabase(ctx, (error) => {
    ctx.log.warn({ err: error }, 'the database is away, waiting for it')
    tellAway()
  })
  return { ready, away }
}

/** Everything beside answering requests; each part is stopped by `shutdown`. */
async function startParts(ctx: AppContext, shutdown: Shutdown): Promise<void> {
  await shutdown.add(boardHub(ctx))
  await shutdown.add(startHousekeeping(ctx))
  if (ctx.config.jobs) await shutdown.add(await startJobs(ctx, smtpTransport(ctx.config.smtpUrl)))
}

function endOnSignals(shutdown: Shutdown): void {
  for (const signal of ['SIGTERM', 'SIGINT'] as const) {
    process.on(signal, () => {
      setTimeout(() => process.exit(0), LAST_CALL_MS).unref()
      void shutdown.run(signal).then(() => process.exit(0))
    })
  }
}

/** Says why in plain words on standard error, also where the log is silent. */
function fail(error: unknown): never {
  const isConfig = error instanceof ConfigError
  process.stderr.write(`${isConfig ? error.message : error instanceof Error ? error.stack : String(error)}\n`)
  process.exit(isConfig ? EXIT_CONFIG : 1)
}

try {
  await serve(readConfig(process.env))
} catch (error) {
  fail(error)
}
