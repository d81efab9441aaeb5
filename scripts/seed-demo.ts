// Loads the demo group into a database without any group: `seed-demo.ts [--as-of=YYYY-MM-DDTHH:mmZ]`, settings as for the server.
import { parseArgs } from 'node:util'
import pg from 'pg'
import { systemClock } from '#server/clock.ts'
import { readConfig } from '#server/config.ts'
import type { AppContext } from '#server/context.ts'
import { createDataSource } from '#server/data-source.ts'
import { createLog } from '#server/log.ts'
import { prepareDatabase } from '#server/prepare-database.ts'
import { seedDemo } from './demo/seed.ts'
import { DEMO_SIGN_INS } from './demo/sign-ins.ts'
import { holdsAGroup, removeUnfinished, waitForOtherLoading } from './demo/unfinished.ts'

/** The day on which the scenario's last day falls; without the option, that of now. */
function asOfOption(): Date {
  const { values } = parseArgs({ options: { 'as-of': { type: 'string' } } })
  const asOf = values['as-of'] === undefined ? systemClock.now() : new Date(values['as-of'])
  if (Number.isNaN(asOf.getTime())) throw new Error('--as-of is no instant: 2026-11-01T01:00Z is one.')
  return asOf
}

async function load(ctx: AppContext, owner: pg.Client, asOf: Date): Promise<void> {
  await waitForOtherLoading(owner)
  if (await holdsAGroup(owner))
    return console.log('There is a group in this database already: nothing is loaded.')
  if (await removeUnfinished(owner)) console.log('Removed what an unfinished loading had left.')
  try {
    // Nobody sees the group before its last step, which waits for the disk and for all that came before it.
    await ctx.db.query('SET synchronous_commit = off')
    await seedDemo(ctx, { asOf })
  } catch (error) {
    await removeUnfinished(owner)
    throw error
  }
  const width = Math.max(...DEMO_SIGN_INS.map(({ address }) => address.length))
  console.log('The demo group is there. Sign in as:')
  for (const { address, password, role } of DEMO_SIGN_INS) {
    console.log(`  ${address.padEnd(width)}  ${password}  (${role})`)
  }
}

async function run(): Promise<void> {
  const asOf = asOfOption()
  const config = readConfig(process.env)
  // One connection: one step follows the other, and what is set on it holds for all of them.
  const db = createDataSource({ url: config.databaseUrl, size: 1 })
  const ctx: AppContext = { config, db, clock: systemClock, log: createLog(config.logLevel) }
  await prepareDatabase(ctx, () => console.log('The database is away, waiting for it'))
  const owner = new pg.Client({ connectionString: config.databaseOwnerUrl })
  await owner.connect()
  try {
    await load(ctx, owner, asOf)
  } finally {
    await owner.end()
    await db.destroy()
  }
}

run().catch((error: unknown) => {
  console.error(error)
  process.exitCode = 1
})
