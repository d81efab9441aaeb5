import fc from 'fast-check'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { kitTimeline } from '#shared/engine/readiness/timeline.ts'
import { loadKitStates } from '#server/services/load-kit-states.ts'
import { raiseRevision } from '#server/services/board-rows.ts'
import { rewriteReadiness } from '#server/services/rewrite-readiness.ts'
import type { GroupTx } from '#server/group-transaction.ts'
import {
  calibration,
  fullCount,
  givenStation,
  heatTest,
  inspection,
  newTestId,
  recorded,
  stoppedHeatTest,
  type Station,
} from '../../support/evidence.ts'
import {
  at as atVersion,
  givenItem,
  givenPlace,
  into,
  moved,
  to,
  type Item,
  type Kit,
  type Place,
} from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let group: TestGroup
let member: TestMember
let thermometer: Item
let stations: Station[]
let keeper: TestMember
let shelf: Place

beforeAll(async () => {
  app = await startTestApp()
  group = await app.givenGroup('Periods')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  shelf = await givenPlace(keeper)
  member = await app.givenMember(group)
  thermometer = await givenItem(keeper, 'thermometer')
  const first = await givenStation(keeper, { details: { transformer: { bands: ['40 m', '20 m', '10 m'] } } })
  stations = [first, await givenStation(keeper, { kind: first.kind })]
})
afterAll(() => app.close())

interface Row {
  [column: string]: unknown
  kit_id: string
  from_at: Date
  to_at: Date | null
  verdict: string
  reasons: unknown
  capability: unknown
  known_since: Date
}

const stored = (tx: GroupTx) =>
  tx.sql<Row>({
    name: '',
    text: `SELECT kit_id, lower(during) AS from_at, upper(during) AS to_at, verdict, reasons, capability, known_since
      FROM readiness_period ORDER BY kit_id, lower(during)`,
  })

/** Waits for the stored periods of each kit, which must follow each other without gap or overlap to no end. */
async function tiled(): Promise<Map<string, Row[]>> {
  const rows = await app.inGroup(group, stored)
  const byKit = new Map<string, Row[]>()
  for (const row of rows) byKit.set(row.kit_id, [...(byKit.get(row.kit_id) ?? []), row])
  for (const periods of byKit.values()) {
    periods.forEach((period, index) => expect(period.to_at).toEqual(periods[index + 1]?.from_at ?? null))
  }
  return byKit
}

type Change = (station: Station, at: string) => Promise<unknown>

const heat = (station: Station, at: string, stop: boolean) => {
  const common = { performedAt: at, instrumentId: thermometer.id }
  const id = station.items.transformer!.id
  return recorded(member, stop ? stoppedHeatTest(id, common) : heatTest(id, common))
}

const CHANGES: Readonly<Record<string, Change>> = {
  'heat test passes': (station, at) => heat(station, at, false),
  'heat test fails': (station, at) => heat(station, at, true),
  'old heat test arrives late': (station) => heat(station, '2026-02-01T12:00:00Z', false),
  'radio found broken': (station, at) =>
    recorded(member, inspection(station.items.radio!.id, at, 'no audio')),
  'radio found whole': (station, at) => recorded(member, inspection(station.items.radio!.id, at)),
  counted: (station, at) => recorded(member, fullCount(station.kit, at)),
  'thermometer calibrated': (_station, at) => recorded(member, calibration(thermometer.id, at)),
  'thermometer off': (_station, at) => recorded(member, calibration(thermometer.id, at, false)),
  'radio taken out, or put back': async ({ kit, items }) => {
    const radio = (await keeper.get(`/api/v1/items/${items.radio!.id}`)).body as Item
    const home = into(kit, 'radio')
    if (radio.kit) await moved(keeper, radio, to(shelf), { from: home })
    else await moved(keeper, radio, home, { from: to(shelf) })
  },
  'said to be out of service, or available': async ({ kit }) => {
    const { version, availability } = (await keeper.get(`/api/v1/kits/${kit.id}`)).body as Kit
    const now =
      availability === 'available'
        ? { availability: 'out-of-service', reason: 'Key abroad' }
        : { availability: 'available' }
    await atVersion(version, keeper.post(`/api/v1/kits/${kit.id}/availability`, now)).expect(200)
  },
  'verdict lowered for a month': ({ kit }, at) =>
    keeper
      .put(`/api/v1/kits/${kit.id}/decisions/${newTestId()}`, {
        kind: 'lowered',
        toVerdict: 'not-proven',
        reason: 'A smell',
        untilAt: new Date(Date.parse(at) + 30 * 86_400_000).toISOString(),
      })
      .expect(200),
}

const history = fc.array(
  fc.record({
    change: fc.constantFrom(...Object.keys(CHANGES)),
    kit: fc.nat(1),
    minutes: fc.constantFrom(0, 1, 60 * 24 * 40),
  }),
  { minLength: 1, maxLength: 8 },
)

describe('stored periods', () => {
  it('say from the last change on what a fresh computation says, and about the past what was known then', async () => {
    await fc.assert(
      fc.asyncProperty(history, async (steps) => {
        for (const { change, kit, minutes } of steps) {
          const before = await tiled()
          app.clock.advance(minutes, 'minutes')
          member = await app.givenMember(group)
          keeper = await app.givenMember(group, { roles: ['quartermaster'] })
          const now = app.clock.now()
          await CHANGES[change]!(stations[kit]!, now.toISOString())
          const after = await tiled()
          for (const [kitId, periods] of after) {
            expect(past(periods, now)).toEqual(past(before.get(kitId) ?? [], now))
          }
        }
        await compareWithFresh()
      }),
      { numRuns: 8, seed: 20261031 },
    )
  }, 120_000)

  it('are the same, revision and all, when nothing has changed', async () => {
    const before = await app.inGroup(group, stored)
    const revision = () =>
      app.inGroup(group, (tx) => tx.sql({ name: '', text: 'SELECT revision FROM board_revision' }))
    const then = await revision()
    app.clock.advance(1, 'minutes')
    await app.inGroup(group, (tx) =>
      rewriteReadiness(
        tx,
        stations.map(({ kit }) => kit.id),
      ),
    )
    expect(await app.inGroup(group, stored)).toEqual(before)
    expect(await revision()).toEqual(then)
    await app.inGroup(group, (tx) => raiseRevision(tx, []))
    expect(await revision()).not.toEqual(then)
  })

  it('cannot overlap: PostgreSQL refuses a second period of the same time', async () => {
    const [row] = await app.inGroup(group, stored)
    const add = app.inGroup(group, (tx) =>
      tx.sql(
        {
          name: '',
          text: `INSERT INTO readiness_period (id, group_id, kit_id, during, verdict, availability, reasons, capability,
              digest, known_since)
            VALUES ($1, $2, $3, tstzrange($4, NULL), 'proven', 'available', '[]', '{}', 'x', now())`,
        },
        [newTestId(), group.id, row!.kit_id, row!.from_at],
      ),
    )
    await expect(add).rejects.toMatchObject({ code: '23P01' })
  })

  it('keep the counts and the rows of the board true', async () => {
    const [counted, rows] = await app.inGroup(group, (tx) =>
      Promise.all([
        tx.sql({
          name: '',
          text: `SELECT verdict, sum(n)::int AS n FROM board_count GROUP BY verdict HAVING sum(n) <> 0 ORDER BY verdict`,
        }),
        tx.sql(
          {
            name: '',
            text: `SELECT b.verdict, count(*)::int AS n FROM readiness_period b
            WHERE during @> $1::timestamptz GROUP BY b.verdict ORDER BY b.verdict`,
          },
          [app.clock.now()],
        ),
      ]),
    )
    expect(counted).toEqual(rows)
  })
})

/** What is on record about the time before an instant; a period that reaches over it is cut there. */
function past(periods: readonly Row[], now: Date) {
  return periods
    .filter(({ from_at: from }) => from < now)
    .map(({ from_at: from, to_at: to, verdict, reasons }) => ({
      from,
      to: to === null || to > now ? now : to,
      verdict,
      reasons,
    }))
}

async function compareWithFresh(): Promise<void> {
  const now = app.clock.now()
  const byKit = await tiled()
  await app.inGroup(group, async (tx) => {
    for (const { state } of await loadKitStates(tx, [...byKit.keys()])) {
      const fresh = kitTimeline(state, now.getTime())
      const kept = byKit.get(state.kit.id)!.filter(({ to_at: to }) => to === null || to > now)
      expect(
        kept.map(({ from_at: from, verdict, reasons, capability }) => ({
          from: Math.max(from.getTime(), now.getTime()),
          verdict,
          reasons,
          capability,
        })),
      ).toEqual(
        fresh.map(({ from, verdict, reasons, capability }) => ({ from, verdict, reasons, capability })),
      )
    }
  })
}
