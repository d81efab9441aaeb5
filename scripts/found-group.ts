// Founds a group and invites its first administrator by mail: found-group.ts --name N --zone Z --admin A --email E, settings as for the server.
import { parseArgs } from 'node:util'
import { systemClock } from '#server/clock.ts'
import { readConfig } from '#server/config.ts'
import type { AppContext } from '#server/context.ts'
import { createDataSource } from '#server/data-source.ts'
import { createLog } from '#server/log.ts'
import { prepareDatabase } from '#server/prepare-database.ts'
import { foundGroupWithAdministrator, readNewGroup } from './lib/new-group.ts'

const USAGE =
  'Usage: node --import tsx scripts/found-group.ts --name NAME --zone Europe/Paris --admin NAME --email ADDRESS'

async function run(): Promise<void> {
  const { values } = parseArgs({
    options: {
      name: { type: 'string' },
      zone: { type: 'string' },
      admin: { type: 'string' },
      email: { type: 'string' },
    },
  })
  const group = readNewGroup(values)
  const config = readConfig(process.env)
  const db = createDataSource({ url: config.databaseUrl, size: 2 })
  const ctx: AppContext = { config, db, clock: systemClock, log: createLog(config.logLevel) }
  await prepareDatabase(ctx, () => console.log('The database is away, waiting for it'))
  try {
    await foundGroupWithAdministrator(ctx, group)
    console.log(`${group.name} is founded. The invitation goes to ${group.email} when the server runs.`)
  } finally {
    await db.destroy()
  }
}

run().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error)
  console.error(USAGE)
  process.exitCode = 1
})
