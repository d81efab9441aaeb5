// Derives every stored result again with today's engine and lists what would differ; changes nothing. Settings as for the server.
import { systemActor } from '#server/caller.ts'
import { systemClock } from '#server/clock.ts'
import { readConfig } from '#server/config.ts'
import type { AppContext } from '#server/context.ts'
import { createDataSource } from '#server/data-source.ts'
import { inGroup } from '#server/group-transaction.ts'
import { createLog } from '#server/log.ts'
import { recomputeTests, type Difference } from '#server/services/evidence/recompute-tests.ts'
import { listGroups } from '#server/services/list-groups.ts'

async function run(): Promise<void> {
  const config = readConfig(process.env)
  const db = createDataSource({ url: config.databaseUrl, size: 2 })
  const ctx: AppContext = { config, db, clock: systemClock, log: createLog(config.logLevel) }
  await db.initialize()
  try {
    if (await listDifferences(ctx)) process.exitCode = 1
  } finally {
    await db.destroy()
  }
}

/** True when there are any. */
async function listDifferences(ctx: AppContext): Promise<boolean> {
  const startedAt = performance.now()
  let [tests, without, different] = [0, 0, 0]
  for (const { id: groupId } of await listGroups(ctx)) {
    const scope = { groupId, actor: systemActor('recompute-tests') }
    const found = await inGroup(ctx, scope, recomputeTests)
    tests += found.tests
    without += found.without
    different += found.differences.length
    for (const difference of found.differences) console.log(described(groupId, difference))
  }
  const seconds = (performance.now() - startedAt) / 1000
  const pace = Math.round(tests / seconds)
  console.log(`${tests} tests in ${seconds.toFixed(1)} s (${pace} a second): ${different} would differ.`)
  if (without > 0) console.log(`${without} were stored without what they were judged with, and are left out.`)
  return different > 0
}

function described(
  groupId: string,
  { testId, procedure, performedOn, engineVersion, faults }: Difference,
): string {
  const lines = faults.map(
    ({ path, stored, derived }) => `    ${path}: ${JSON.stringify(stored)} -> ${JSON.stringify(derived)}`,
  )
  const head = `group ${groupId}, test ${testId}: ${procedure} of ${performedOn}, engine ${engineVersion}`
  return [head, ...lines].join('\n')
}

run().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error)
  process.exitCode = 1
})
