import pg from 'pg'

/** Bytes of write-ahead log that `work` caused, on an otherwise quiet cluster. */
export async function walBytes(ownerUrl: string, work: () => Promise<void>): Promise<number> {
  const client = new pg.Client({ connectionString: ownerUrl })
  await client.connect()
  try {
    const position = async () =>
      (await client.query<{ at: string }>('SELECT pg_current_wal_insert_lsn() AS at')).rows[0]!.at
    const before = await position()
    await work()
    const { rows } = await client.query<{ bytes: string }>('SELECT pg_wal_lsn_diff($1, $2) AS bytes', [
      await position(),
      before,
    ])
    return Number(rows[0]!.bytes)
  } finally {
    await client.end()
  }
}
