import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { failStatement } from '../../support/failing-statement.ts'
import { givenStation, heatTest, inspection, newTestId, type Station } from '../../support/evidence.ts'
import { givenItem, type Item } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let group: TestGroup
let keeper: TestMember
let volunteer: TestMember
let thermometer: Item
let station: Station

beforeAll(async () => {
  app = await startTestApp()
  group = await app.givenGroup('Once')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  volunteer = await app.givenMember(group)
  thermometer = await givenItem(keeper, 'thermometer')
  station = await givenStation(keeper)
})
afterAll(() => app.close())

const body = (riseK = 40) =>
  heatTest(
    station.items.transformer!.id,
    { performedAt: app.clock.now().toISOString(), instrumentId: thermometer.id },
    { riseK },
  )

/** Everything that recording a test writes, counted past row-level security's filter of the group. */
async function written(): Promise<Record<string, number>> {
  const [row] = await app.inGroup(group, (tx) =>
    tx.sql<Record<string, number>>({
      name: '',
      text: `SELECT (SELECT count(*)::int FROM test) AS tests, (SELECT count(*)::int FROM test_effect) AS effects,
        (SELECT count(*)::int FROM audit_event) AS entries, (SELECT count(*)::int FROM readiness_period) AS periods,
        (SELECT revision::float8 FROM board_revision) AS revision, (SELECT sum(n)::int FROM board_count) AS counted`,
    }),
  )
  return row!
}

describe('a test that is sent again (P1)', () => {
  it('gets the first answer, also when it is no longer the newest', async () => {
    app.clock.advance(1, 'minutes')
    const testId = newTestId()
    const sent = body()
    const first = await volunteer.put(`/api/v1/tests/${testId}`, sent)
    app.clock.advance(1, 'minutes')
    await volunteer.put(`/api/v1/tests/${newTestId()}`, body(63))
    const before = await written()
    const again = await volunteer.put(`/api/v1/tests/${testId}`, sent)
    expect([again.status, again.body]).toEqual([200, first.body])
    expect(await written()).toEqual(before)
  })

  it('is the same test when its ids are written in capital letters', async () => {
    app.clock.advance(1, 'minutes')
    const testId = newTestId()
    const sent = body(42)
    const first = await volunteer.put(`/api/v1/tests/${testId}`, sent)
    const loud = { ...sent, itemId: sent.itemId.toUpperCase() }
    const again = await volunteer.put(`/api/v1/tests/${testId.toUpperCase()}`, loud)
    expect([again.status, again.body]).toEqual([200, first.body])
  })

  it('is stored once when twenty retries race', async () => {
    app.clock.advance(1, 'minutes')
    const testId = newTestId()
    const sent = body(41)
    const before = await written()
    const retries = Array.from({ length: 20 }, () => volunteer.put(`/api/v1/tests/${testId}`, sent))
    const answers = await Promise.all(retries)
    expect(answers.map(({ status }) => status)).toEqual(Array(20).fill(200))
    expect(new Set(answers.map(({ text }) => text)).size).toBe(1)
    const after = await written()
    expect(after.tests! - before.tests!).toBe(1)
    expect(after.effects! - before.effects!).toBe(1)
    expect(after.entries! - before.entries!).toBe(1)
  })

  it('is stored once on a shelf too, where no kit is locked', async () => {
    const spare = await givenItem(keeper, 'radio')
    const testId = newTestId()
    const sent = inspection(spare.id, app.clock.now().toISOString())
    const retries = Array.from({ length: 10 }, () => volunteer.put(`/api/v1/tests/${testId}`, sent))
    const answers = await Promise.all(retries)
    expect(answers.map(({ status }) => status)).toEqual(Array(10).fill(200))
    expect(answers[0]!.body.effects).toEqual([])
  })

  it('is refused with other content under the same id, whoever sends it', async () => {
    const testId = newTestId()
    await volunteer.put(`/api/v1/tests/${testId}`, body())
    const answer = await volunteer.put(`/api/v1/tests/${testId}`, body(42))
    expect([answer.status, answer.body.code]).toEqual([409, 'id-taken'])
    const other = await app.givenMember(await app.givenGroup('Elsewhere'), { roles: ['quartermaster'] })
    const radio = await givenItem(other, 'radio')
    const foreign = await other.put(
      `/api/v1/tests/${testId}`,
      inspection(radio.id, app.clock.now().toISOString()),
    )
    expect([foreign.status, foreign.body.code]).toEqual([409, 'id-taken'])
    expect((await other.get(`/api/v1/tests/${testId}`)).status).toBe(404)
  })
})

describe('a test whose recording is cut short (P9)', () => {
  it('leaves nothing, whichever statement fails, and is stored by the retry', async () => {
    app.clock.advance(1, 'minutes')
    const before = await written()
    const testId = newTestId()
    const sent = body(43)
    for (let nth = 1; ; nth += 1) {
      const injection = failStatement(app, nth)
      const answer = await volunteer.put(`/api/v1/tests/${testId}`, sent)
      injection.stop()
      if (injection.failed === undefined) {
        expect(answer.status).toBe(200)
        expect(nth).toBeGreaterThan(15)
        break
      }
      expect([injection.failed, answer.status]).toEqual([injection.failed, 507])
      expect([nth, await written()]).toEqual([nth, before])
    }
    expect((await written()).tests! - before.tests!).toBe(1)
  })

  it('leaves nothing when the connection is killed in the middle of it', async () => {
    app.clock.advance(1, 'minutes')
    const before = await written()
    const sent = body(44)
    const testId = newTestId()
    let kill: Promise<unknown> | undefined
    // Holds the kit, so that the recording waits in the middle of its transaction until its connection is killed.
    await app.inGroup(group, async (tx) => {
      await tx.sql({ name: '', text: 'SELECT FROM kit WHERE id = $1 FOR UPDATE' }, [station.kit.id])
      const recording = volunteer.put(`/api/v1/tests/${testId}`, sent).then((answer) => answer.status)
      for (let tries = 0; tries < 100; tries += 1) {
        const killed = await tx.sql<{ n: number }>({
          name: '',
          text: `SELECT count(pg_terminate_backend(pid))::int AS n FROM pg_stat_activity
            WHERE datname = current_database() AND wait_event_type = 'Lock' AND pid <> pg_backend_pid()`,
        })
        if (killed[0]!.n > 0) break
        await new Promise((resolve) => setTimeout(resolve, 20))
      }
      kill = recording
    })
    expect(await kill).toBe(503)
    expect(await written()).toEqual(before)
    expect((await volunteer.put(`/api/v1/tests/${testId}`, sent)).status).toBe(200)
  })
})

describe('many who record on one kit at once (W2, P8)', () => {
  /** As a phone does: told to come back, it comes back with the same test. */
  async function send(testId: string, sent: object): Promise<number> {
    for (let tries = 1; ; tries += 1) {
      const { status } = await volunteer.put(`/api/v1/tests/${testId}`, sent)
      if (status !== 503 || tries === 10) return status
    }
  }

  it('all get through, nothing is lost and nothing waits in a circle', async () => {
    app.clock.advance(1, 'minutes')
    const before = await written()
    const answers = await Promise.all(
      Array.from({ length: 32 }, (_, n) => send(newTestId(), body(30 + n / 2))),
    )
    expect(answers).toEqual(Array(32).fill(200))
    const after = await written()
    expect(after.tests! - before.tests!).toBe(32)
    expect(after.effects! - before.effects!).toBe(32)
    expect(after.entries! - before.entries!).toBe(32)
  })
})
