import { createHmac } from 'node:crypto'
import { join } from 'node:path'
import { tmpdir } from 'node:os'
import { createDataSource } from '#server/data-source.ts'
import { systemActor } from '#server/caller.ts'
import { systemClock } from '#server/clock.ts'
import { readConfig } from '#server/config.ts'
import type { AppContext } from '#server/context.ts'
import { inGroup } from '#server/group-transaction.ts'
import { createLog } from '#server/log.ts'
import { SESSION_COOKIE } from '#server/middleware/session-cookie.ts'
import { openSession } from '#server/services/sessions.ts'
import { startChild } from '../lib/child.ts'
import type { TestDatabase } from '../lib/clone-database.ts'
import { findFreePort } from '../lib/free-port.ts'
import { root } from '../lib/paths.ts'
import { startProductServer } from '../lib/product-server.ts'
import { makeSecret } from '../lib/secrets.ts'
import { startMailFake } from '../mail-fake/start-mail-fake.ts'

/** The product as it is deployed, beside a floor server of our own on the same database. */
export interface BenchProduct {
  readonly url: string
  readonly pid: number
  readonly floorUrl: string
  readonly floorPid: number
  readonly database: TestDatabase
  /** The headers of a member's browser. */
  signedIn(memberId: string, groupId: string): Promise<Record<string, string>>
  readonly ctx: AppContext
  stop(): Promise<void>
}

export async function startBenchProduct(database: TestDatabase): Promise<BenchProduct> {
  const mail = await startMailFake({ folder: join(tmpdir(), `halyard-bench-${process.pid}`) })
  const port = await findFreePort()
  const url = `http://localhost:${port}`
  const env = {
    NODE_ENV: 'production' as const,
    PORT: String(port),
    PUBLIC_URL: url,
    DATABASE_URL: database.appUrl,
    DATABASE_OWNER_URL: database.ownerUrl,
    SMTP_URL: mail.smtpUrl,
    SESSION_SECRET: makeSecret(),
    LOG_LEVEL: 'info',
  }
  const server = await startProductServer({ env, logPath: '/dev/null' })
  const floorPort = await findFreePort()
  const floor = startChild('node', ['--import', 'tsx', 'scripts/bench/floor-server.ts'], {
    cwd: root,
    env: { ...process.env, PORT: String(floorPort), DATABASE_URL: database.ownerUrl },
    stdio: ['ignore', 'ignore', 'inherit'],
  })
  await untilAnswers(`http://127.0.0.1:${floorPort}/`)
  const config = readConfig(env)
  const db = createDataSource({ url: database.appUrl, size: 2 })
  await db.initialize()
  const ctx: AppContext = { config, db, clock: systemClock, log: createLog('silent') }
  return {
    url: `http://127.0.0.1:${port}`,
    pid: server.child.process.pid!,
    floorUrl: `http://127.0.0.1:${floorPort}`,
    floorPid: floor.process.pid!,
    database,
    ctx,
    signedIn: (memberId, groupId) => signedIn(ctx, memberId, groupId),
    stop: async () => {
      await floor.stop()
      await server.child.stop()
      await db.destroy()
      await mail.stop()
    },
  }
}

async function signedIn(ctx: AppContext, memberId: string, groupId: string): Promise<Record<string, string>> {
  const session = { memberId, ownDevice: true, device: 'bench', address: '127.0.0.1' }
  const sid = await inGroup(ctx, { groupId, actor: systemActor('bench') }, (tx) => openSession(tx, session))
  const signature = createHmac('sha256', ctx.config.sessionSecret)
    .update(sid)
    .digest('base64')
    .replace(/=+$/, '')
  return {
    Cookie: `${SESSION_COOKIE}=${encodeURIComponent(`s:${sid}.${signature}`)}`,
    Origin: ctx.config.publicUrl,
  }
}

async function untilAnswers(url: string): Promise<void> {
  for (let tries = 0; tries < 200; tries += 1) {
    const answered = await fetch(url).then(
      () => true,
      () => false,
    )
    if (answered) return
    await new Promise((resolve) => setTimeout(resolve, 50))
  }
  throw new Error(`Nothing answers at ${url}`)
}
