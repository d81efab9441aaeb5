/** Migrations go up, down and up to the same schema, and two at once end well (promise P37). */
import { execFile } from 'node:child_process'
import { createHash } from 'node:crypto'
import { promisify } from 'node:util'
import { DataSource } from 'typeorm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { migrate } from '#server/data-source.ts'
import { entities } from '#server/entities/index.ts'
import { migrations } from '#server/migrations/index.ts'
import { createEmptyDatabase, type TestDatabase } from '../../support/test-database.ts'

let database: TestDatabase

beforeAll(async () => {
  database = await createEmptyDatabase()
})
afterAll(() => database.drop())

/** The schema as PostgreSQL would write it down; what each dump makes up anew is left out. */
async function schemaOf({ ownerUrl }: TestDatabase): Promise<string> {
  const args = ['--schema-only', '--no-comments', '--exclude-schema=pgboss', ownerUrl]
  const { stdout } = await promisify(execFile)('pg_dump', args, { maxBuffer: 64 * 1024 * 1024 })
  return stdout.replace(/^\\(un)?restrict .*$/gm, '').replace(/^--.*$/gm, '')
}

async function withSource<T>(work: (source: DataSource) => Promise<T>): Promise<T> {
  const source = new DataSource({ type: 'postgres', url: database.ownerUrl, entities, migrations })
  await source.initialize()
  try {
    return await work(source)
  } finally {
    await source.destroy()
  }
}

const hash = (text: string) => createHash('sha256').update(text).digest('hex')

describe('migrations', () => {
  it(
    'go up, again without effect, down one by one to nothing, and up to the same',
    { timeout: 120_000 },
    async () => {
      await migrate(database.ownerUrl)
      const whole = await schemaOf(database)
      await migrate(database.ownerUrl)
      expect(hash(await schemaOf(database))).toBe(hash(whole))

      const stages: string[] = []
      await withSource(async (source) => {
        for (let left = migrations.length; left > 0; left -= 1) {
          stages.unshift(await schemaOf(database))
          await source.undoLastMigration({ transaction: 'each' })
        }
        const leftovers = await source.query<{ name: string }[]>(
          `SELECT relname AS name FROM pg_class WHERE relnamespace = 'public'::regnamespace
          AND relkind <> 'i' AND relname NOT LIKE 'migrations%'
         UNION ALL SELECT proname FROM pg_proc WHERE pronamespace = 'public'::regnamespace`,
        )
        expect(leftovers).toEqual([])
      })

      await migrate(database.ownerUrl)
      expect(hash(await schemaOf(database))).toBe(hash(whole))
      expect(hash(stages.at(-1) ?? '')).toBe(hash(whole))
    },
  )

  it('run once when two servers start at once', { timeout: 120_000 }, async () => {
    const fresh = await createEmptyDatabase()
    try {
      await Promise.all([migrate(fresh.ownerUrl), migrate(fresh.ownerUrl)])
      expect(hash(await schemaOf(fresh))).toBe(hash(await schemaOf(database)))
    } finally {
      await fresh.drop()
    }
  })

  it('make every column that the entities name', async () => {
    await withSource(async (source) => {
      for (const { tableName, columns } of source.entityMetadatas) {
        const rows = await source.query<{ name: string; nullable: boolean }[]>(
          `SELECT attname AS name, NOT attnotnull AS nullable FROM pg_attribute
           WHERE attrelid = $1::regclass AND attnum > 0 AND NOT attisdropped`,
          [tableName],
        )
        const made = new Map(rows.map(({ name, nullable }) => [name, nullable]))
        for (const { databaseName, isNullable } of columns)
          expect([tableName, databaseName, made.get(databaseName)]).toEqual([
            tableName,
            databaseName,
            isNullable,
          ])
      }
    })
  })
})
