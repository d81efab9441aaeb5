import pg from 'pg'
import { ROLES } from './cluster-roles.ts'
import type { Cluster } from './cluster.ts'

/**
 * Runs `fill` on a new, empty database `halyard`. What was there is kept under another name; when `fill` fails (an
 * exit code other than 0) it is put back. Nobody may be connected.
 */
export async function replaceDatabase(
  cluster: Pick<Cluster, 'url'>,
  fill: () => Promise<number>,
): Promise<number> {
  const kept = `halyard_until_${new Date().toISOString().replace(/\D/g, '').slice(0, 14)}`
  await asSuperuser(cluster, [
    `ALTER DATABASE halyard RENAME TO ${kept}`,
    `CREATE DATABASE halyard OWNER ${ROLES.owner}`,
  ])
  const code = await fill()
  if (code === 0) console.error(`What was there before is kept in the database ${kept}.`)
  else {
    await asSuperuser(cluster, [
      'DROP DATABASE halyard WITH (FORCE)',
      `ALTER DATABASE ${kept} RENAME TO halyard`,
    ])
  }
  return code
}

async function asSuperuser(cluster: Pick<Cluster, 'url'>, statements: readonly string[]): Promise<void> {
  const client = new pg.Client({ connectionString: cluster.url('super', 'postgres') })
  await client.connect()
  try {
    for (const statement of statements) await client.query(statement)
  } finally {
    await client.end()
  }
}
