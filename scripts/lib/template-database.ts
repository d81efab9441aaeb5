import pg from 'pg'
import { migrate } from '#server/data-source.ts'
import { localDayOf } from '../demo/calendar.ts'
import { root } from './paths.ts'
import { startProgram } from './product-server.ts'
import { makeSecret } from './secrets.ts'
import { withDatabase, type TestPg } from './test-cluster.ts'
import { treeHash } from './tree-hash.ts'

/** Any number, as long as every run on a shared cluster takes the same one. */
const TEMPLATE_LOCK = 4_190_277_316

/** What decides the schema: a change here makes a new template beside the old one. */
const SCHEMA_SOURCES = ['server/migrations', 'server/data-source.ts']
const DEMO_SOURCES = ['server', 'shared', 'scripts/demo', 'scripts/seed-demo.ts', 'package-lock.json']

/** The name of a migrated, empty database to clone from, made at first need; runs side by side wait for each other. */
export function ensureTemplate(testPg: TestPg): Promise<string> {
  const name = `template_${shortHash(SCHEMA_SOURCES)}`
  return ensureDatabase({ testPg, name, from: 'template1', fill: ({ ownerUrl }) => migrate(ownerUrl) })
}

/** The same with the demo group in it, its last day being that of `asOf`: today unless given. */
export async function ensureDemoTemplate(testPg: TestPg, asOf = new Date()): Promise<string> {
  const day = localDayOf(asOf).replaceAll('-', '')
  const name = `demo_${day}_${shortHash(DEMO_SOURCES)}`
  const fill = (database: TestPg) => loadDemo(database, asOf)
  return ensureDatabase({ testPg, name, from: await ensureTemplate(testPg), fill })
}

async function loadDemo({ ownerUrl, appUrl }: TestPg, asOf: Date): Promise<void> {
  const env = {
    NODE_ENV: 'production',
    PORT: '0',
    PUBLIC_URL: 'http://localhost',
    DATABASE_URL: appUrl,
    DATABASE_OWNER_URL: ownerUrl,
    SMTP_URL: 'smtp://127.0.0.1:9',
    SESSION_SECRET: makeSecret(),
  } as const
  const loading = startProgram('scripts/seed-demo.ts', env, [`--as-of=${asOf.toISOString()}`])
  if ((await loading.ended) !== 0) throw new Error('The demo group could not be loaded: see above.')
}

function shortHash(sources: readonly string[]): string {
  return treeHash(root, sources).slice(0, 16)
}

interface Making {
  testPg: TestPg
  name: string
  from: string
  fill: (database: TestPg) => Promise<void>
}

/** Made under another name and renamed when whole, so that a killed run leaves no half-made template. */
async function ensureDatabase({ testPg, name, from, fill }: Making): Promise<string> {
  const client = new pg.Client({ connectionString: withDatabase(testPg.ownerUrl, 'postgres') })
  await client.connect()
  try {
    await client.query('SELECT pg_advisory_lock($1)', [TEMPLATE_LOCK])
    const found = await client.query('SELECT 1 FROM pg_database WHERE datname = $1', [name])
    if (found.rowCount !== 0) return name
    const draft = `${name}_draft`
    await client.query(`DROP DATABASE IF EXISTS ${draft} WITH (FORCE)`)
    await client.query(`CREATE DATABASE ${draft} TEMPLATE ${from}`)
    await fill({
      ownerUrl: withDatabase(testPg.ownerUrl, draft),
      appUrl: withDatabase(testPg.appUrl, draft),
    })
    await client.query(`ALTER DATABASE ${draft} RENAME TO ${name}`)
    return name
  } finally {
    await client.end()
  }
}
