import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { createInterface } from 'node:readline'
import pg from 'pg'
import { afterAll, describe, expect, it, vi } from 'vitest'
import { isAlive, startChild, type Child } from '../../scripts/lib/child.ts'
import { clusterFolder } from '../../scripts/lib/cluster-folder.ts'
import { attachCluster } from '../../scripts/lib/cluster.ts'
import { root, stateFolder } from '../../scripts/lib/paths.ts'
import { postmasterState } from '../../scripts/lib/postmaster.ts'
import { removeCluster } from '../../scripts/lib/test-cluster.ts'

vi.setConfig({ testTimeout: 180_000 })

/** A start of the test's own, beside any that a person runs. */
const slot = `test-${process.pid}-start`

afterAll(() => removeCluster(slot))

interface Started {
  child: Child
  url: string
  mailUrl: string
  postgresPid: number
}

async function start(): Promise<Started> {
  const child = startChild('node', ['--import', 'tsx', 'scripts/lib/start.ts', slot, '--no-demo'], {
    cwd: root,
    env: { PATH: process.env.PATH, HOME: process.env.HOME },
    stdio: ['ignore', 'pipe', 'inherit'],
    endSignal: 'SIGINT',
  })
  if (!child.process.stdout) throw new Error('It says nothing.')
  const said: string[] = []
  for await (const line of createInterface({ input: child.process.stdout })) {
    said.push(line)
    if (line.includes('Ctrl-C stops')) break
  }
  const find = (name: string) => new RegExp(`${name} +(http\\S+)`).exec(said.join('\n'))?.[1] ?? ''
  const postgresPid = postmasterState(join(clusterFolder(slot), 'data'))?.pid ?? 0
  return { child, url: find('Open'), mailUrl: find('Mail'), postgresPid }
}

async function countNotes(sql: string): Promise<number> {
  const client = new pg.Client({ connectionString: attachCluster(clusterFolder(slot)).url('owner') })
  await client.connect()
  try {
    await client.query(sql)
    return (await client.query('SELECT FROM note')).rowCount ?? 0
  } finally {
    await client.end()
  }
}

describe('scripts/start', () => {
  let first: Started

  it('serves the product and the page that shows its mails', async () => {
    first = await start()
    await vi.waitUntil(async () => (await fetch(`${first.url}/readyz`)).ok, { timeout: 30_000 })
    expect((await fetch(first.url)).status).toBe(200)
    expect(await (await fetch(first.mailUrl)).text()).toContain('No mail yet')
  })

  it('stops all of it on Ctrl-C', async () => {
    expect(await countNotes('CREATE TABLE note (id int); INSERT INTO note VALUES (1)')).toBe(1)
    expect(await first.child.stop()).toBe(0)
    expect(isAlive(first.postgresPid)).toBe(false)
    await expect(fetch(first.url)).rejects.toThrow()
    await expect(fetch(first.mailUrl)).rejects.toThrow()
  })

  it('keeps data, secrets and address for the next start, even after kill -9', async () => {
    const secrets = readFileSync(join(stateFolder, slot, 'secrets.json'), 'utf8')
    const second = await start()
    second.child.signalGroup('SIGKILL')
    await second.child.ended
    const third = await start()
    expect(third.url).toBe(first.url)
    expect(await countNotes('INSERT INTO note VALUES (2)')).toBe(2)
    expect(readFileSync(join(stateFolder, slot, 'secrets.json'), 'utf8')).toBe(secrets)
    expect(await third.child.stop()).toBe(0)
    expect([second, third].map(({ postgresPid }) => isAlive(postgresPid))).toEqual([false, false])
  })
})
