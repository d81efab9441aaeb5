import { join } from 'node:path'
import pg from 'pg'
import { UNFINISHED } from '../demo/unfinished.ts'
import { startChild } from './child.ts'
import type { Ending } from './ending.ts'
import { root } from './paths.ts'
import type { ProductEnv } from './product-server.ts'

/**
 * Fills a database without any group, or with one whose loading was cut off, with the demo group. True when the demo
 * group is in it afterwards.
 */
export async function loadDemo(env: ProductEnv, ending: Ending): Promise<boolean> {
  const url = env.DATABASE_OWNER_URL ?? env.DATABASE_URL
  const before = await groupsIn(url)
  if (before !== 'none') return before === 'demo'
  console.log('Loading the demo group: fourteen months of records, this takes a moment')
  const seeding = startChild('node', ['--import', 'tsx', join(root, 'scripts/seed-demo.ts')], {
    cwd: root,
    env: { ...process.env, ...env },
    // Its list of sign-ins is ours to show, once everything runs.
    stdio: ['ignore', 'ignore', 'inherit'],
  })
  await ending.add(() => seeding.stop())
  if ((await seeding.ended) !== 0) throw new Error('The demo group could not be loaded: see above.')
  return (await groupsIn(url)) === 'demo'
}

/** What a database holds, before its first migration too. A role that sees no group finds none. */
async function groupsIn(url: string): Promise<'none' | 'demo' | 'other'> {
  const client = new pg.Client({ connectionString: url, connectionTimeoutMillis: 5000 })
  await client.connect()
  try {
    const table = await client.query<{ isThere: boolean }>(
      `SELECT to_regclass('public.groups') IS NOT NULL AS "isThere"`,
    )
    if (!table.rows[0]?.isThere) return 'none'
    const groups = await client.query<{ demo: boolean }>(
      `SELECT demo FROM groups WHERE NOT (${UNFINISHED}) ORDER BY demo DESC LIMIT 1`,
    )
    const first = groups.rows[0]
    if (!first) return 'none'
    return first.demo ? 'demo' : 'other'
  } finally {
    await client.end()
  }
}
