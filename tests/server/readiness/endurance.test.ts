import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { KitReadiness } from '#shared/contracts/kit-readiness.ts'
import { givenStation, recorded, type Station } from '../../support/evidence.ts'
import { at, givenItem, givenKitKind, position, type Item } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

/** From a radio check to the hours on the kit's page: a station of 30 usable Ah (lithium, 80 % of 37.5 Ah). */

let app: TestApp
let keeper: TestMember
let member: TestMember
let wattmeter: Item
let station: Station

beforeAll(async () => {
  app = await startTestApp({ now: '2026-06-01T12:00:00.000Z' })
  const group = await app.givenGroup('Endurance')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  member = await app.givenMember(group)
  wattmeter = await givenItem(keeper, 'wattmeter')
  const tester = await givenItem(keeper, 'battery-tester')
  const promise = { bands: ['2 m'], modes: ['voice'], watts: 50, hours: 12, transmitPercent: 25 }
  const kind = await givenKitKind(keeper, { promise, positions: [position('radio'), position('battery')] })
  station = await givenStation(keeper, {
    kind,
    details: {
      radio: { bands: ['2 m'], ratedWatts: 50, meanLoadA: 5 },
      battery: { chemistry: 'lifepo4', ratedAh: 37.5, maxA: 10 },
    },
  })
  await recorded(member, {
    procedure: 'battery-capacity',
    itemId: station.items.battery!.id,
    performedAt: now(),
    method: 'Discharge to the cut-off',
    instrumentId: tester.id,
    inputs: { measuredAh: 37.5, cutOffV: 10, temperatureC: 25 },
  })
})
afterAll(() => app.close())
beforeEach(() => app.clock.advance(10, 'minutes'))

const now = () => app.clock.now().toISOString()
const capability = async () => {
  const { body } = await member.get(`/api/v1/kits/${station.kit.id}/readiness`)
  return (body as KitReadiness).period
}
const radioCheck = (inputs: object) => ({
  procedure: 'radio-check' as const,
  itemId: station.items.radio!.id,
  performedAt: now(),
  method: 'Power into a dummy load, receive check',
  instrumentId: wattmeter.id,
  inputs: {
    readings: [{ band: '2 m', settingW: 50, measuredW: 50, currentA: 11 }],
    receives: true,
    ...inputs,
  },
})

describe('the hours of a kit', () => {
  it('come from the mean load written down with the radio until its currents are measured', async () => {
    expect((await capability()).capability).toMatchObject({ hours: 6 })
    const { results } = await recorded(member, radioCheck({ receiveA: 1, currentOf: 'station' }))
    expect(results.currents).toEqual({
      of: 'station',
      receiveA: 1,
      transmit: [{ settingW: 50, currentA: 11 }],
    })
    const { capability: measured, reasons } = await capability()
    expect(measured.hours).toBeCloseTo(30 / (0.25 * 11 + 0.75 * 1), 9)
    expect(measured.hoursConditions).toContain(
      'transmitting 25 % of the time, voice, FM, at 20 °C, currents measured',
    )
    expect(reasons).toContainEqual(expect.objectContaining({ code: 'battery-over-current', level: 'note' }))
  })

  it('follow a later measurement, and a check of the power alone leaves them', async () => {
    await recorded(member, radioCheck({ receiveA: 2 }))
    const later = 30 / (0.25 * 11 + 0.75 * 2)
    expect((await capability()).capability.hours).toBeCloseTo(later, 9)
    app.clock.advance(10, 'minutes')
    await recorded(member, radioCheck({}))
    expect((await capability()).capability.hours).toBeCloseTo(later, 9)
  })

  it('refuse a share of the time that is none', async () => {
    const { kind } = station
    const promise = { ...kind.promise, transmitPercent: 120 }
    const body = { code: kind.code, name: kind.name, station: true, promise, positions: kind.positions }
    const answer = await at(kind.version, keeper.post(`/api/v1/kit-kinds/${kind.id}`, body))
    expect(answer.status).toBe(422)
    expect(JSON.stringify(answer.body)).toContain('transmitPercent')
  })
})
