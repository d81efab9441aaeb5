import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { READINESS_VERSION } from '#shared/engine/readiness/timeline.ts'
import type { GroupTx } from '#server/group-transaction.ts'
import { rejudgeGroups } from '#server/services/readiness/rejudge-groups.ts'
import { givenStation, type Station } from '../../support/evidence.ts'
import { startTestApp, type TestApp, type TestGroup } from '../../support/test-app.ts'

let app: TestApp
let group: TestGroup
let stations: Station[]

beforeAll(async () => {
  app = await startTestApp()
  group = await app.givenGroup('Upgraded')
  const keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  stations = [await givenStation(keeper), await givenStation(keeper)]
  app.clock.advance(2, 'hours')
})
afterAll(() => app.close())

const run = (text: string) =>
  app.inGroup(group, (tx: GroupTx) => tx.sql<Record<string, unknown>>({ name: '', text }))

const periods = () =>
  run(`SELECT kit_id, lower(during) AS from_at, upper(during) AS to_at, verdict, reasons, capability
    FROM readiness_period ORDER BY kit_id, lower(during)`)
const revision = async () => (await run('SELECT revision::float8 FROM board_revision'))[0]!.revision as number
const version = async () => (await run('SELECT version FROM readiness_judged'))[0]?.version

/** As another version of us would have stored them. */
const judgedOtherwise = () =>
  run(`UPDATE readiness_period SET verdict = 'proven', reasons = '[]', digest = 'another'`)
const upgraded = () => run('UPDATE readiness_judged SET version = version - 1')

describe('stored periods after an upgrade that judges otherwise', () => {
  it('are worked out anew from now on for every kit, and what was known before stays', async () => {
    await rejudgeGroups(app.ctx)
    const right = await periods()
    await judgedOtherwise()
    await upgraded()
    const before = await revision()
    await rejudgeGroups(app.ctx)
    const now = app.clock.now()
    const after = await periods()
    const past = after.filter(({ from_at: from }) => (from as Date) < now)
    const future = after.filter(({ from_at: from }) => (from as Date) >= now)
    expect(past.map(({ verdict, to_at: to }) => [verdict, to])).toEqual(stations.map(() => ['proven', now]))
    expect(future.map(({ verdict, reasons }) => [verdict, reasons])).toEqual(
      right.map(({ verdict, reasons }) => [verdict, reasons]),
    )
    expect(await revision()).toBeGreaterThan(before)
    expect(await version()).toBe(READINESS_VERSION)
  })

  it('are left alone where they were judged by the rules of today', async () => {
    await rejudgeGroups(app.ctx)
    const [before, at] = [await periods(), await revision()]
    app.clock.advance(1, 'hours')
    await rejudgeGroups(app.ctx)
    await upgraded()
    await rejudgeGroups(app.ctx)
    expect([await periods(), await revision()]).toEqual([before, at])
  })
})
