import fc from 'fast-check'
import { v7 as uuidv7 } from 'uuid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { KitReadiness } from '#shared/contracts/kit-readiness.ts'
import { kitTimeline } from '#shared/engine/readiness/timeline.ts'
import { loadKitStates } from '#server/services/load-kit-states.ts'
import {
  fullCount,
  givenStation,
  heatTest,
  inspection,
  stoppedHeatTest,
  type Station,
} from '../../support/evidence.ts'
import {
  givenItem,
  givenPlace,
  into,
  moved,
  to,
  type Item,
  type Kit,
  type KitKind,
  type Place,
} from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'

/**
 * Two people change one kit at the same moment: it ends as if one had come after the other, whichever it was, and what
 * is stored is what a fresh computation says.
 */

let app: TestApp
let group: TestGroup
let keeper: TestMember
let other: TestMember
let place: Place
let thermometer: Item
let kind: KitKind | undefined

beforeAll(async () => {
  app = await startTestApp()
  group = await app.givenGroup('Two writers')
  keeper = await app.givenMember(group, { roles: ['quartermaster'], name: 'Keeper' })
  other = await app.givenMember(group, { roles: ['net-coordinator'], name: 'Coordinator' })
  place = await givenPlace(keeper)
  thermometer = await givenItem(keeper, 'thermometer')
})
afterAll(() => app.close())

interface Scene {
  readonly station: Station
  readonly kit: Kit
  readonly spare: Item
}

async function scene(): Promise<Scene> {
  const details = { transformer: { bands: ['40 m', '20 m', '10 m'] } }
  const station = await givenStation(keeper, { kit: { placeId: place.id }, details, ...(kind && { kind }) })
  kind = station.kind
  const spare = await moved(keeper, await givenItem(keeper, 'radio'), to(place))
  return { station, spare, kit: (await keeper.get(`/api/v1/kits/${station.kit.id}`)).body as Kit }
}

type Change = (scene: Scene, by: TestMember, at: string) => Promise<{ status: number }>

const test = (body: object, by: TestMember) =>
  by.put(`/api/v1/tests/${uuidv7()}`, body).then(({ status }) => ({ status }))
const common = (at: string) => ({ performedAt: at, instrumentId: thermometer.id })
const radio = ({ station }: Scene) => station.items.radio!
const move = (item: Item, from: object, destination: object, by: TestMember) =>
  by
    .post(`/api/v1/items/${item.id}/moves`, { moveId: uuidv7(), from, to: destination })
    .then(({ status }) => ({ status }))

const CHANGES: Readonly<Record<string, Change>> = {
  'heat test passes': ({ station }, by, at) => test(heatTest(station.items.transformer!.id, common(at)), by),
  'heat test fails': ({ station }, by, at) =>
    test(stoppedHeatTest(station.items.transformer!.id, common(at)), by),
  'radio found broken': (one, by, at) => test(inspection(radio(one).id, at, 'no audio'), by),
  counted: ({ kit }, by, at) => test(fullCount(kit, at), by),
  'radio taken out': (one, by) => move(radio(one), into(one.kit, 'radio'), to(place), by),
  'spare put in': (one, by) => move(one.spare, to(place), into(one.kit, 'radio'), by),
  'out of service': ({ kit }, by) =>
    by
      .post(`/api/v1/kits/${kit.id}/availability`, { availability: 'out-of-service', reason: 'Key abroad' })
      .set('If-Match', `"${kit.version}"`)
      .then(({ status }) => ({ status })),
  'check asked for': ({ station }, by) =>
    by
      .put(`/api/v1/raised-checks/${uuidv7()}`, {
        procedure: 'inspection',
        itemId: station.items.battery!.id,
        cause: 'drop',
        reason: 'It fell',
        doubtsEarlier: true,
        dueOn: '2026-06-10',
      })
      .then(({ status }) => ({ status })),
  'verdict lowered': ({ kit }, by) =>
    by
      .put(`/api/v1/kits/${kit.id}/decisions/${uuidv7()}`, {
        kind: 'lowered',
        toVerdict: 'not-proven',
        reason: 'A smell',
      })
      .then(({ status }) => ({ status })),
}

/** What is said of the kit, with the names of its own things made the same in every scene. */
async function said({ kit, spare }: Scene): Promise<object> {
  const { timeline, availability } = (await keeper.get(`/api/v1/kits/${kit.id}/readiness`))
    .body as KitReadiness
  const names = new Map([
    [kit.designation, 'KIT'],
    [spare.designation, 'SPARE'],
  ])
  for (const { name, items } of kit.positions)
    items.forEach(({ designation }, index) => names.set(designation, `${name} ${index}`))
  const plain = (text: string) => text.replace(/[A-Z]+-\d+/g, (name) => names.get(name) ?? name)
  return {
    availability,
    periods: timeline.map(({ from, verdict, reasons }) => ({
      from,
      verdict,
      reasons: reasons.map(
        ({ code, level, text }) =>
          `${code} ${level} ${plain(text).replace(/Keeper|Coordinator/g, 'Somebody')}`,
      ),
    })),
  }
}

async function isFresh({ kit }: Scene): Promise<void> {
  const { timeline } = (await keeper.get(`/api/v1/kits/${kit.id}/readiness`)).body as KitReadiness
  await app.inGroup(group, async (tx) => {
    const [loaded] = await loadKitStates(tx, [kit.id])
    const fresh = kitTimeline(loaded!.state, tx.now.getTime())
    expect(timeline.map(({ verdict, reasons }) => ({ verdict, reasons }))).toEqual(
      fresh.map(({ verdict, reasons }) => ({ verdict, reasons })),
    )
  })
}

const pairs = fc.tuple(fc.constantFrom(...Object.keys(CHANGES)), fc.constantFrom(...Object.keys(CHANGES)))

describe('two writers at once', () => {
  it('end as one after the other, in one order or the other', async () => {
    await fc.assert(
      fc.asyncProperty(pairs, async ([one, two]) => {
        const [together, first, second] = [await scene(), await scene(), await scene()]
        app.clock.advance(1, 'minutes')
        const at = app.clock.now().toISOString()
        await Promise.all([CHANGES[one]!(together, keeper, at), CHANGES[two]!(together, other, at)])
        await CHANGES[one]!(first, keeper, at)
        await CHANGES[two]!(first, other, at)
        await CHANGES[two]!(second, other, at)
        await CHANGES[one]!(second, keeper, at)
        expect([await said(first), await said(second)]).toContainEqual(await said(together))
        await isFresh(together)
      }),
      { numRuns: 12, seed: 20261031 },
    )
  }, 120_000)
})
