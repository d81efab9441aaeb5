import { mkdirSync } from 'node:fs'
import { join } from 'node:path'
import { cloneDatabase, type TestDatabase } from '../../../scripts/lib/clone-database.ts'
import { findFreePort } from '../../../scripts/lib/free-port.ts'
import { stateFolder } from '../../../scripts/lib/paths.ts'
import {
  startProductServer,
  type ProductEnv,
  type ProductServer,
} from '../../../scripts/lib/product-server.ts'
import { makeSecret } from '../../../scripts/lib/secrets.ts'
import type { TestPg } from '../../../scripts/lib/test-cluster.ts'
import { startTestMailFake, type MailFake } from '../../support/mail-fake.ts'

/** The built product as it is deployed: its own server process, database and mail server. */
export interface Product {
  readonly url: string
  readonly database: TestDatabase
  readonly mail: MailFake
  /** kill -9: nothing in flight is finished. */
  kill(): Promise<void>
  /** Serves again at the same address, from the same database. */
  restart(): Promise<void>
  stop(): Promise<void>
}

/** `demo`: with the demo group in its database; `empty`: migrated, and nobody in it. */
export type Template = 'demo' | 'empty'

export async function startProduct(template: Template = 'demo'): Promise<Product> {
  const database = await cloneDatabase(readEnv<TestPg>('HALYARD_TEST_PG'), templateName(template))
  const mail = await startTestMailFake()
  const port = await findFreePort()
  const env: ProductEnv = {
    NODE_ENV: 'production',
    HOST: '127.0.0.1',
    PORT: String(port),
    PUBLIC_URL: `http://localhost:${port}`,
    DATABASE_URL: database.appUrl,
    DATABASE_OWNER_URL: database.ownerUrl,
    SMTP_URL: mail.smtpUrl,
    SESSION_SECRET: makeSecret(),
  }
  let server = await serve(env)
  return {
    url: env.PUBLIC_URL,
    database,
    mail,
    kill: async () => {
      server.child.signalGroup('SIGKILL')
      await server.child.ended
    },
    restart: async () => {
      server = await serve(env)
    },
    stop: async () => {
      await server.child.stop()
      await mail.stop()
      await database.drop()
    },
  }
}

function serve(env: ProductEnv): Promise<ProductServer> {
  const folder = process.env.HALYARD_TEST_OUTPUT ?? join(stateFolder, 'browser-tests')
  mkdirSync(folder, { recursive: true })
  return startProductServer({ env, logPath: join(folder, `server-${env.PORT}.log`) })
}

function templateName(template: Template): string {
  return readEnv<Record<Template, string>>('HALYARD_TEST_TEMPLATES')[template]
}

function readEnv<Value>(name: string): Value {
  const value = process.env[name]
  if (!value) throw new Error(`${name} is not set: the global setup sets it.`)
  return JSON.parse(value) as Value
}
