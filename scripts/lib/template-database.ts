import pg from 'pg'
import { migrate } from '#server/data-source.ts'
import { root } from './paths.ts'
import { treeHash } from './tree-hash.ts'
import { withDatabase } from './test-cluster.ts'

/** Any number, as long as every run on a shared cluster takes the same one. */
const TEMPLATE_LOCK = 4_190_277_316

/** What decides the schema: a change here makes a new template beside the old one. */
const SCHEMA_SOURCES = ['server/migrations', 'server/data-source.ts']

/** The name of a migrated, empty database to clone from, made at first need; runs side by side wait for each other. */
export function ensureTemplate(ownerUrl: string): Promise<string> {
  const name = `template_${treeHash(root, SCHEMA_SOURCES).slice(0, 16)}`
  return ensureDatabase(ownerUrl, name, migrate)
}

/** Made under another name and renamed when whole, so that a killed run leaves no half-made template. */
export async function ensureDatabase(
  ownerUrl: string,
  name: string,
  fill: (url: string) => Promise<void>,
): Promise<string> {
  const client = new pg.Client({ connectionString: withDatabase(ownerUrl, 'postgres') })
  await client.connect()
  try {
    await client.query('SELECT pg_advisory_lock($1)', [TEMPLATE_LOCK])
    const found = await client.query('SELECT 1 FROM pg_database WHERE datname = $1', [name])
    if (found.rowCount !== 0) return name
    const draft = `${name}_draft`
    await client.query(`DROP DATABASE IF EXISTS ${draft} WITH (FORCE)`)
    await client.query(`CREATE DATABASE ${draft}`)
    await fill(withDatabase(ownerUrl, draft))
    await client.query(`ALTER DATABASE ${draft} RENAME TO ${name}`)
    return name
  } finally {
    await client.end()
  }
}
