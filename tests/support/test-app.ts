import type { Express } from 'express'
import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { v7 as uuidv7 } from 'uuid'
import type { Role } from '#shared/contracts/roles.ts'
import { createApp } from '#server/app.ts'
import { systemActor } from '#server/caller.ts'
import { readConfig, type Config } from '#server/config.ts'
import type { AppContext } from '#server/context.ts'
import { createDataSource } from '#server/data-source.ts'
import { Group } from '#server/entities/Group.ts'
import { Member } from '#server/entities/Member.ts'
import { inGroup, type GroupTx } from '#server/group-transaction.ts'
import { createLog } from '#server/log.ts'
import { openSession } from '#server/services/sessions.ts'
import { cookieOf, TEST_ORIGIN, TEST_SECRET, TestClient } from './test-client.ts'
import { TestClock } from './test-clock.ts'
import { createTestDatabase, type TestDatabase } from './test-database.ts'

export interface TestGroup {
  readonly id: string
  readonly name: string
}

/** A signed-in member. */
export class TestMember extends TestClient {
  readonly memberId: string
  readonly groupId: string
  readonly email: string

  constructor(server: Server, row: Member, sid: string) {
    super(server, cookieOf(sid))
    this.memberId = row.id
    this.groupId = row.groupId
    this.email = row.email ?? ''
  }
}

interface Options {
  /** Where the clock stands at first; 2026-06-01 12:00 UTC unless told. */
  now?: string
  config?: Partial<Config>
  /** In the place of a database of the test's own, e.g. one behind a proxy. */
  databaseUrl?: string
}

const NOON = '2026-06-01T12:00:00Z'

/** The whole application on a database of its own, listening on a free port of loopback. Call `close` at the end. */
export async function startTestApp(options: Options = {}): Promise<TestApp> {
  const database = options.databaseUrl === undefined ? await createTestDatabase() : undefined
  const databaseUrl = options.databaseUrl ?? database!.appUrl
  const config: Config = {
    ...readConfig({
      NODE_ENV: 'test',
      PUBLIC_URL: TEST_ORIGIN,
      DATABASE_URL: databaseUrl,
      SMTP_URL: 'smtp://127.0.0.1:1',
      SESSION_SECRET: TEST_SECRET,
      LOG_LEVEL: process.env.HALYARD_TEST_LOG ?? 'silent',
    }),
    ...options.config,
  }
  const db = createDataSource({ url: databaseUrl, size: 6 })
  await db.initialize()
  const clock = new TestClock(new Date(options.now ?? NOON))
  const ctx: AppContext = { config, db, clock, log: createLog(config.logLevel) }
  const app = createApp(ctx)
  const server = createServer(app)
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  return new TestApp({ app, server, ctx, clock, database })
}

interface Parts {
  app: Express
  server: Server
  ctx: AppContext
  clock: TestClock
  database: TestDatabase | undefined
}

let count = 0

export class TestApp {
  readonly app: Express
  readonly server: Server
  readonly ctx: AppContext
  readonly clock: TestClock
  /** Absent where the test brought its own address. */
  readonly database: TestDatabase | undefined

  constructor({ app, server, ctx, clock, database }: Parts) {
    this.app = app
    this.server = server
    this.ctx = ctx
    this.clock = clock
    this.database = database
  }

  get url(): string {
    return `http://127.0.0.1:${(this.server.address() as AddressInfo).port}`
  }

  /** A browser that is signed out, or another window of a member who is signed in. */
  request(caller?: TestClient): TestClient {
    return new TestClient(this.server, caller?.cookie)
  }

  /** Runs `work` inside a group, as the system. */
  inGroup<T>(group: { id: string }, work: (tx: GroupTx) => Promise<T>): Promise<T> {
    return inGroup(this.ctx, { groupId: group.id, actor: systemActor('test') }, work)
  }

  async givenGroup(name: string, columns: Partial<Group> = {}): Promise<TestGroup> {
    const id = uuidv7()
    await this.inGroup({ id }, async (tx) => {
      const row = { id, name, shortName: name.slice(0, 40), timeZone: 'America/New_York', ...columns }
      await tx.manager.insert(Group, { ...row, createdAt: tx.now })
    })
    return { id, name }
  }

  /** A member with a session, opened without a password: the password is taken to have been given just now. */
  async givenMember(
    group: TestGroup,
    columns: Partial<Omit<Member, 'roles'>> & { roles?: readonly Role[] } = {},
  ): Promise<TestMember> {
    count += 1
    const { roles = ['volunteer'], ...rest } = columns
    return this.inGroup(group, async (tx) => {
      const row = await tx.repository(Member).insert({
        id: uuidv7(),
        name: `Member ${count}`,
        email: `member${count}@example.org`,
        createdAt: tx.now,
        ...rest,
        roles: [...roles],
      })
      const session = { memberId: row.id, ownDevice: true, device: 'Test browser', address: '127.0.0.1' }
      return new TestMember(this.server, row, await openSession(tx, session))
    })
  }

  async close(): Promise<void> {
    this.server.closeAllConnections()
    await new Promise<void>((resolve) => this.server.close(() => resolve()))
    await this.ctx.db.destroy()
    await this.database?.drop()
  }
}
