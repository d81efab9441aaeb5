// The floors of the bench: node:http and named statements, without session, rights, validation, audit or separation.
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http'
import pg from 'pg'
import { BENCH_GROUP } from './thousand-kits.ts'

const pool = new pg.Pool({ connectionString: process.env.DATABASE_URL, max: 12 })
pool.on('error', () => undefined)

/** (a): 50 kits with their jsonb, the total and the counts by verdict. */
async function boardWhole(): Promise<object> {
  const [rows, counts] = await Promise.all([
    pool.query({
      name: 'a-rows',
      text: `SELECT k.id, k.designation, p.verdict, p.availability, p.reasons, p.capability, upper(p.during) AS until
        FROM kit k JOIN readiness_period p ON p.kit_id = k.id AND p.during @> now()
        WHERE k.group_id = $1 ORDER BY p.verdict, k.id LIMIT 50`,
      values: [BENCH_GROUP],
    }),
    pool.query({
      name: 'a-counts',
      text: 'SELECT verdict, count(*)::int AS n FROM board_row WHERE group_id = $1 GROUP BY verdict',
      values: [BENCH_GROUP],
    }),
  ])
  return { rows: rows.rows, counts: counts.rows }
}

/** a_slim: the kept row alone, with kept counts. */
async function boardSlim(): Promise<object> {
  const [rows, counts] = await Promise.all([
    pool.query({
      name: 'slim-rows',
      text: `SELECT b.*, k.kit_kind_id FROM board_row b JOIN kit k ON k.id = b.kit_id
        WHERE b.group_id = $1 ORDER BY b.verdict_rank, b.holds_until, b.kit_id LIMIT 50`,
      values: [BENCH_GROUP],
    }),
    pool.query({
      name: 'slim-counts',
      text: 'SELECT station, availability, verdict, n FROM board_count WHERE group_id = $1',
      values: [BENCH_GROUP],
    }),
  ])
  return { rows: rows.rows, counts: counts.rows }
}

/** h_raw: one recorded test in seven round trips. */
async function recordRaw(body: { id: string; itemId: string; kitId: string }): Promise<object> {
  const client = await pool.connect()
  try {
    await client.query('BEGIN')
    await client.query({
      name: 'h-lock',
      text: 'SELECT digest FROM bench_state WHERE kit_id = $1 FOR UPDATE',
      values: [body.kitId],
    })
    await client.query({
      name: 'h-insert',
      text: 'INSERT INTO bench_record VALUES ($1, $2, now(), $3, $4) ON CONFLICT (id) DO NOTHING RETURNING id',
      values: [body.id, body.itemId, '{"serviceable":true}', '[]'],
    })
    await client.query({
      name: 'h-newest',
      text: `INSERT INTO bench_newest VALUES ($1, $2, now())
        ON CONFLICT (item_id) DO UPDATE SET record_id = excluded.record_id, at = excluded.at`,
      values: [body.itemId, body.id],
    })
    await client.query({
      name: 'h-items',
      text: 'SELECT * FROM item WHERE kit_id = $1',
      values: [body.kitId],
    })
    await client.query({
      name: 'h-tests',
      text: `SELECT t.id, t.findings FROM test t JOIN item i ON i.id = t.item_id WHERE i.kit_id = $1
        ORDER BY t.performed_at DESC LIMIT 40`,
      values: [body.kitId],
    })
    await client.query({
      name: 'h-state',
      text: 'UPDATE bench_state SET changed = now(), digest = $2 WHERE kit_id = $1',
      values: [body.kitId, body.id],
    })
    await client.query('COMMIT')
    return { id: body.id }
  } finally {
    client.release()
  }
}

/** Streams of the live floor: one LISTEN, one write a connection. */
const streams = new Set<ServerResponse>()

async function listen(): Promise<void> {
  const client = new pg.Client({ connectionString: process.env.DATABASE_URL })
  await client.connect()
  await client.query('LISTEN bench_live')
  client.on('notification', ({ payload }) => {
    const frame = Buffer.from(`data: ${payload}\n\n`)
    for (const stream of streams) stream.write(frame)
  })
}

async function readBody(req: IncomingMessage): Promise<string> {
  let text = ''
  for await (const chunk of req) text += String(chunk)
  return text
}

function openStream(req: IncomingMessage, res: ServerResponse): void {
  res.writeHead(200, { 'Content-Type': 'text/event-stream' })
  res.write(': open\n\n')
  streams.add(res)
  req.on('close', () => streams.delete(res))
}

async function answer(req: IncomingMessage, res: ServerResponse): Promise<void> {
  if (req.url === '/live') return openStream(req, res)
  const value =
    req.url === '/board'
      ? await boardWhole()
      : req.url === '/slim'
        ? await boardSlim()
        : req.method === 'PUT'
          ? await recordRaw(JSON.parse(await readBody(req)) as Parameters<typeof recordRaw>[0])
          : {}
  res.writeHead(200, { 'Content-Type': 'application/json' })
  res.end(JSON.stringify(value))
}

await listen()
createServer((req, res) => {
  answer(req, res).catch((error: unknown) => {
    res.writeHead(500)
    res.end(String(error))
  })
}).listen(Number(process.env.PORT), '127.0.0.1')
