import { v7 as uuidv7 } from 'uuid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { KitReadiness } from '#shared/contracts/kit-readiness.ts'
import type { WeatherEffect } from '#shared/contracts/weather-events.ts'
import { givenStation, recorded, inspection, type Station } from '../../support/evidence.ts'
import {
  givenItem,
  givenKitKind,
  givenPlace,
  moved,
  position,
  to,
  type Place,
} from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

/** After weather a coordinator makes everything due that stood in it, in one action. */

let app: TestApp
let keeper: TestMember
let coordinator: TestMember
let roof: Place
let cellar: Place
let there: Station
let elsewhere: Station

beforeAll(async () => {
  app = await startTestApp()
  const group = await app.givenGroup('Weather')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  coordinator = await app.givenMember(group, { roles: ['net-coordinator'] })
  roof = await givenPlace(keeper)
  cellar = await givenPlace(keeper)
  const kind = await givenKitKind(keeper, {
    positions: [position('radio'), position('antenna'), position('mast')],
  })
  there = await givenStation(keeper, { kind, kit: { placeId: roof.id } })
  elsewhere = await givenStation(keeper, { kind, kit: { placeId: cellar.id } })
  await moved(keeper, await givenItem(keeper, 'feedline'), to(roof))
  await recorded(keeper, inspection(there.items.mast!.id, '2026-05-20T12:00:00Z'))
})
afterAll(() => app.close())

const event = (fields: object = {}) => ({
  reason: 'Ice storm of 31 May',
  dueOn: '2026-06-08',
  placeIds: [roof.id],
  onIssue: false,
  doubtsEarlier: true,
  ...fields,
})
const readiness = async ({ kit }: Station) =>
  (await coordinator.get(`/api/v1/kits/${kit.id}/readiness`)).body as KitReadiness

describe('a weather event', () => {
  it('names beforehand what it makes due and what that does to the kits, and stores nothing', async () => {
    const before = await readiness(there)
    const { body } = await coordinator.post('/api/v1/weather-events/preview', event()).expect(200)
    const { checks } = body as WeatherEffect
    expect(checks.map(({ procedure }) => procedure).sort()).toEqual([
      'antenna-sweep',
      'feedline-loss',
      'inspection',
    ])
    expect(checks.some(({ itemId }) => itemId === elsewhere.items.antenna!.id)).toBe(false)
    expect((await readiness(there)).raisedChecks).toEqual(before.raisedChecks)
  })

  it('makes the exposed items there due with the reason, as it said, and leaves the others', async () => {
    const foretold = (await coordinator.post('/api/v1/weather-events/preview', event()).expect(200))
      .body as WeatherEffect
    const done = (await coordinator.post('/api/v1/weather-events', event({ eventId: uuidv7() })).expect(200))
      .body as WeatherEffect
    expect(done).toEqual(foretold)
    const after = await readiness(there)
    expect(after.raisedChecks.map(({ cause, reason, dueOn }) => [cause, reason, dueOn])).toEqual([
      ['storm', 'Ice storm of 31 May', '2026-06-08'],
      ['storm', 'Ice storm of 31 May', '2026-06-08'],
    ])
    for (const { kitId, after: then } of foretold.kits.filter(({ kitId: id }) => id === there.kit.id))
      expect({ kitId, verdict: after.period.verdict, holdsUntil: after.holdsUntil }).toEqual({
        kitId,
        ...then,
      })
    expect((await readiness(elsewhere)).raisedChecks).toEqual([])
    const { rows } = (await coordinator.get(`/api/v1/history/item/${there.items.antenna!.id}`)).body
    expect(rows[0].summary).toContain('Ice storm of 31 May')
  })

  it('raises nothing twice when it is sent twice', async () => {
    const path = '/api/v1/weather-events'
    const body = event({ eventId: uuidv7(), placeIds: [cellar.id] })
    const first = await coordinator.post(path, body).expect(200)
    const once = (await readiness(elsewhere)).raisedChecks.length
    const late = await givenItem(keeper, 'mast')
    await moved(keeper, late, to(cellar))
    const again = await coordinator.post(path, body).expect(200)
    expect(again.body).toEqual(first.body)
    expect((await readiness(elsewhere)).raisedChecks).toHaveLength(once)
    for (const other of [{ reason: 'Hail' }, { placeIds: [cellar.id, roof.id] }])
      expect((await coordinator.post(path, { ...body, ...other })).body).toMatchObject({ code: 'id-taken' })
  })

  it('asks where it was', async () => {
    const answer = await coordinator.post('/api/v1/weather-events/preview', event({ placeIds: [] }))
    expect(answer.status).toBe(422)
    expect(answer.body.errors).toEqual([{ pointer: '#/placeIds', detail: 'Choose where it was.' }])
  })
})
