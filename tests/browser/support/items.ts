import pg from 'pg'
import type { Product } from './product.ts'

/** The id of an item of the demo group by the name it is called by. */
export async function idOfItem(product: Product, designation: string): Promise<string> {
  const client = new pg.Client({ connectionString: product.database.ownerUrl })
  await client.connect()
  try {
    const sql = 'SELECT id FROM item WHERE designation = $1 AND retired_at IS NULL'
    const { rows } = await client.query<{ id: string }>(sql, [designation])
    if (!rows[0]) throw new Error(`${designation} is not in the demo group`)
    return rows[0].id
  } finally {
    await client.end()
  }
}
