import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { readFileSync, statSync } from 'node:fs'
import { join } from 'node:path'
import { createInterface } from 'node:readline'
import pg from 'pg'
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest'
import { isAlive } from '../../scripts/lib/child.ts'
import type { Role } from '../../scripts/lib/cluster-roles.ts'
import { attachCluster, type Cluster } from '../../scripts/lib/cluster.ts'
import { root } from '../../scripts/lib/paths.ts'
import { startOwnCluster, type OwnCluster } from '../support/own-cluster.ts'

// Processes and linters take their time on a busy machine.
vi.setConfig({ testTimeout: 60_000 })

let own: OwnCluster

beforeAll(async () => {
  own = await startOwnCluster()
}, 60_000)

afterAll(() => own.remove())

async function ask<Row extends pg.QueryResultRow>(
  role: Role,
  sql: string,
  from: Pick<Cluster, 'url'> = own.now,
): Promise<Row[]> {
  const client = new pg.Client({ connectionString: from.url(role) })
  await client.connect()
  try {
    return (await client.query<Row>(sql)).rows
  } finally {
    await client.end()
  }
}

describe('startCluster', () => {
  it.each(['fsync', 'synchronous_commit', 'full_page_writes', 'data_checksums'])(
    'has %s on (P2)',
    async (setting) => {
      expect(await ask('app', `SELECT current_setting('${setting}') AS value`)).toEqual([{ value: 'on' }])
    },
  )

  it('listens on loopback only and asks for scram passwords', async () => {
    const rules = `SELECT DISTINCT auth_method FROM pg_hba_file_rules`
    expect(await ask('super', rules)).toEqual([{ auth_method: 'scram-sha-256' }])
    expect(await ask('app', `SELECT current_setting('listen_addresses') AS value`)).toEqual([
      { value: '127.0.0.1' },
    ])
  })

  it('gives the application a role that is neither owner nor superuser (P13)', async () => {
    const roles = await ask(
      'app',
      `SELECT rolname, rolsuper, rolbypassrls FROM pg_roles WHERE rolname LIKE 'halyard%' ORDER BY 1`,
    )
    expect(roles).toEqual([
      { rolname: 'halyard_app', rolsuper: false, rolbypassrls: false },
      { rolname: 'halyard_backup', rolsuper: false, rolbypassrls: true },
      { rolname: 'halyard_owner', rolsuper: false, rolbypassrls: false },
    ])
    await expect(ask('app', 'CREATE TABLE mine (id int)')).rejects.toThrow('permission denied')
  })

  it('never runs as root', () => {
    expect(readFileSync(`/proc/${own.now.pid}/status`, 'utf8')).not.toMatch(/^Uid:\s+0/m)
  })

  it('keeps its passwords from everyone else', () => {
    expect(statSync(join(own.folder, 'secrets.json')).mode & 0o777).toBe(0o600)
    expect(statSync(join(own.folder, 'data')).mode & 0o777).toBe(0o700)
  })

  it('can be found by another process of ours', async () => {
    expect(await ask('app', 'SELECT 1 AS one', attachCluster(own.folder))).toEqual([{ one: 1 }])
  })

  it('keeps what was committed through a crash (P33)', async () => {
    await ask('owner', 'CREATE TABLE kept (id int); INSERT INTO kept VALUES (7)')
    await own.stop('immediate')
    const startedAt = Date.now()
    await own.start()
    expect(await ask('owner', 'SELECT id FROM kept')).toEqual([{ id: 7 }])
    expect(Date.now() - startedAt).toBeLessThan(30_000)
  })

  it('ends with the process that started it, even by kill -9, and the next start works', async () => {
    await own.stop()
    const pid = await startElsewhereAndKill()
    await own.start()
    expect(isAlive(pid)).toBe(false)
    expect(await ask('owner', 'SELECT id FROM kept')).toEqual([{ id: 7 }])
  })
})

/** Starts the cluster in a process of its own, kills that process, and gives PostgreSQL's process id. */
async function startElsewhereAndKill(): Promise<number> {
  const program = `
    import { startCluster } from ${JSON.stringify(join(root, 'scripts/lib/cluster.ts'))}
    const cluster = await startCluster({ folder: ${JSON.stringify(own.folder)} })
    console.log(cluster.pid)`
  const starter = spawn('node', ['--import', 'tsx', '--input-type=module', '--eval', program], { cwd: root })
  const [line] = (await once(createInterface({ input: starter.stdout }), 'line')) as [string]
  starter.kill('SIGKILL')
  return Number(line)
}
