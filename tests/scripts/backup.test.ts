import { spawn } from 'node:child_process'
import { randomUUID } from 'node:crypto'
import { once } from 'node:events'
import { mkdtempSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { text } from 'node:stream/consumers'
import pg from 'pg'
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest'
import { migrate } from '#server/data-source.ts'
import { root } from '../../scripts/lib/paths.ts'
import { startOwnCluster, type OwnCluster } from '../support/own-cluster.ts'

vi.setConfig({ testTimeout: 60_000 })

/** What the schema is made of: constraints, indexes, policies, row-security flags and rights. */
const SCHEMA = `
  SELECT 'constraint' AS kind, conrelid::regclass::text AS place, pg_get_constraintdef(oid) AS text FROM pg_constraint
    WHERE connamespace = 'public'::regnamespace
  UNION ALL SELECT 'index', tablename, indexdef FROM pg_indexes WHERE schemaname = 'public'
  UNION ALL SELECT 'policy', tablename, concat_ws('|', policyname, roles, cmd, qual, with_check) FROM pg_policies
  UNION ALL SELECT 'function', oid::regprocedure::text, concat_ws('|', prosecdef, proacl, prosrc) FROM pg_proc
    WHERE pronamespace = 'public'::regnamespace AND NOT EXISTS (SELECT FROM pg_depend WHERE objid = pg_proc.oid AND deptype = 'e')
  UNION ALL SELECT 'table', oid::regclass::text, concat_ws('|', relkind, relrowsecurity, relforcerowsecurity, relacl) FROM pg_class
    WHERE relnamespace = 'public'::regnamespace
  ORDER BY 1, 2, 3`

let own: OwnCluster
let folder: string
let file: string

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'halyard-backup-'))
  file = join(folder, 'halyard.dump')
  own = await startOwnCluster()
  await migrate(own.now.url('owner'))
}, 120_000)

afterAll(async () => {
  await own.remove()
  rmSync(folder, { recursive: true })
})

async function ask<Row extends pg.QueryResultRow>(sql: string, database?: string): Promise<Row[]> {
  const client = new pg.Client({ connectionString: own.now.url('owner', database) })
  await client.connect()
  try {
    return (await client.query<Row>(sql)).rows
  } finally {
    await client.end()
  }
}

async function run(script: string, argument: string, env: NodeJS.ProcessEnv) {
  const child = spawn(join(root, 'scripts', script), [argument], { env: { ...process.env, ...env } })
  const said = Promise.all([text(child.stdout), text(child.stderr)])
  const [code] = (await once(child, 'close')) as [number]
  return { code, said: (await said).join('') }
}

const backup = () => run('backup', file, { DATABASE_BACKUP_URL: own.now.url('backup') })
const restore = (database: string, from = file) =>
  run('restore', from, { DATABASE_OWNER_URL: own.now.url('owner', database) })

/** Adds a group and its first member in one transaction, again and again, until told to stop. */
function keepWriting(): () => Promise<void> {
  let goOn = true
  const writing = (async () => {
    while (goOn) {
      const [group, member] = [randomUUID(), randomUUID()]
      await ask(`BEGIN;
        INSERT INTO groups (id, name, short_name, time_zone, created_at) VALUES ('${group}', 'Group', 'G', 'UTC', now());
        INSERT INTO member (id, group_id, name, roles, created_at) VALUES ('${member}', '${group}', 'One', '{observer}', now());
        COMMIT`)
    }
  })()
  return async () => {
    goOn = false
    await writing
  }
}

describe('backup and restore (P36)', () => {
  it('saves whole transactions while writes go on', async () => {
    await ask(`INSERT INTO session (sid, sess, expire) VALUES ('s', '{}', now() + interval '1 day')`)
    const stopWriting = keepWriting()
    await vi.waitUntil(async () => (await ask('SELECT 1 FROM groups')).length > 5, { timeout: 20_000 })
    const { code, said } = await backup()
    await stopWriting()
    expect(said).toContain('Saved')
    expect(code).toBe(0)
    expect(statSync(file).mode & 0o777).toBe(0o600)
  })

  it('restores the same rows, constraints, policies and rights, and no session', async () => {
    await ask('CREATE DATABASE restored', 'postgres')
    expect(await restore('restored')).toMatchObject({ code: 0 })
    expect(await ask(SCHEMA, 'restored')).toEqual(await ask(SCHEMA))
    const groups =
      'SELECT g.id, m.id AS member FROM groups g LEFT JOIN member m ON m.group_id = g.id ORDER BY 1'
    const before = await ask<{ id: string; member: string | null }>(groups)
    const after = await ask<{ id: string; member: string | null }>(groups, 'restored')
    expect(after.length).toBeGreaterThan(5)
    expect(after.filter(({ member }) => member === null)).toEqual([])
    expect(before).toEqual(expect.arrayContaining(after))
    expect(await ask('SELECT sid FROM session', 'restored')).toEqual([])
  })

  it('keeps the migrations that ran, so that the next start finds nothing to do', async () => {
    await migrate(own.now.url('owner', 'restored'))
    expect(await ask('SELECT name FROM migrations ORDER BY id', 'restored')).toEqual(
      await ask('SELECT name FROM migrations ORDER BY id'),
    )
  })

  it('refuses a database that is not empty', async () => {
    expect(await restore('restored')).toMatchObject({
      code: 1,
      said: expect.stringContaining('not empty') as string,
    })
  })

  it('leaves a database empty when the file is damaged', async () => {
    const damaged = join(folder, 'damaged.dump')
    writeFileSync(damaged, 'PGDMP is how it begins, but this is no backup')
    await ask('CREATE DATABASE untouched', 'postgres')
    expect((await restore('untouched', damaged)).code).not.toBe(0)
    expect(
      await ask(`SELECT relname FROM pg_class WHERE relnamespace = 'public'::regnamespace`, 'untouched'),
    ).toEqual([])
  })

  it('does not take a role that sees no rows for a backup of nothing', async () => {
    const { code } = await run('backup', join(folder, 'empty.dump'), {
      DATABASE_BACKUP_URL: own.now.url('app'),
    })
    expect(code).not.toBe(0)
    expect(() => statSync(join(folder, 'empty.dump'))).toThrow('ENOENT')
  })
})
