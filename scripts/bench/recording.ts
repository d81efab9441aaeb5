import pg from 'pg'
import { v7 as uuidv7 } from 'uuid'
import type { BenchProduct } from './bench-product.ts'
import { compare, load, type Target } from './load.ts'
import type { BenchRow } from './report.ts'
import { walBytes } from './wal.ts'

interface Subject {
  item: string
  kit: string
  member: string
  group: string
}

/** W1 and W3: recording an inspection, whole, against one insert with its reads in seven round trips. */
export async function benchRecording(product: BenchProduct): Promise<BenchRow[]> {
  const subjects = await subjectsOf(product.database.ownerUrl)
  const headers = await product.signedIn(subjects[0]!.member, subjects[0]!.group)
  let turn = 0
  const nextSubject = () => subjects[turn++ % subjects.length]!
  const whole: Target = {
    url: product.url,
    pid: product.pid,
    method: 'PUT',
    headers,
    next: () => ({ path: `/api/v1/tests/${uuidv7()}`, body: JSON.stringify(inspectionOf(nextSubject())) }),
  }
  const floor: Target = {
    url: product.floorUrl,
    pid: product.floorPid,
    method: 'PUT',
    next: () => {
      const { item, kit } = nextSubject()
      return { path: '/record', body: JSON.stringify({ id: uuidv7(), itemId: item, kitId: kit }) }
    },
  }
  const at8 = await compare(whole, floor, { clients: 8, requests: 240, rounds: 7 })
  const wal = await walBytes(product.database.ownerUrl, async () => {
    await load(whole, { clients: 1, requests: 100 })
  })
  const ms = (value: number) => `${value.toFixed(1)} ms`
  return [
    {
      id: 'W1',
      what: 'record a test, c8, p50',
      measured: ms(at8.product.p50Ms),
      floor: ms(at8.floor.p50Ms),
      ratio: at8.p50,
      goal: '<= 2.0x h_raw',
    },
    {
      id: 'W1',
      what: 'record a test, c8, Node CPU',
      measured: `${at8.product.cpuUs.toFixed(0)} us`,
      floor: `${at8.floor.cpuUs.toFixed(0)} us`,
      ratio: at8.cpu,
      goal: '<= 2.2x h_raw',
    },
    {
      id: 'W3',
      what: 'WAL of one recorded test',
      measured: `${(wal / 100 / 1024).toFixed(1)} KiB`,
      floor: '',
      ratio: null,
      goal: '<= 2.5 KiB',
    },
  ]
}

function inspectionOf({ item }: Subject): object {
  return {
    procedure: 'inspection',
    itemId: item,
    performedAt: new Date(Date.now() - 60_000).toISOString(),
    method: 'Looked at and shaken',
    inputs: { serviceable: true, found: '' },
  }
}

async function subjectsOf(ownerUrl: string): Promise<Subject[]> {
  const client = new pg.Client({ connectionString: ownerUrl })
  await client.connect()
  try {
    const { rows } = await client.query<Subject>(`
      SELECT DISTINCT ON (i.kit_id) i.id AS item, i.kit_id AS kit, i.group_id AS group,
        (SELECT id FROM member m WHERE m.group_id = i.group_id AND 'volunteer' = ANY (roles) ORDER BY id LIMIT 1) AS member
      FROM item i WHERE i.kit_id IS NOT NULL AND i.category IN ('mast', 'charger', 'jumper') ORDER BY i.kit_id, i.id`)
    return rows
  } finally {
    await client.end()
  }
}
