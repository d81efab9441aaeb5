import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import {
  givenStation,
  heatTest,
  inspection,
  newTestId,
  recorded,
  stoppedHeatTest,
  type Station,
} from '../../support/evidence.ts'
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
  group = await app.givenGroup('Evidence')
  keeper = await app.givenMember(group, { roles: ['quartermaster'], name: 'Keeper' })
  volunteer = await app.givenMember(group, { name: 'Volunteer' })
  thermometer = await givenItem(keeper, 'thermometer')
})
afterAll(() => app.close())

const common = () => ({ performedAt: app.clock.now().toISOString(), instrumentId: thermometer.id })

describe('recording a heat test', () => {
  beforeAll(async () => {
    station = await givenStation(keeper)
  })
  beforeEach(() => app.clock.advance(1, 'minutes'))

  it('answers the finding, the rule that it was judged by and what it did to the kit', async () => {
    const test = await recorded(volunteer, stoppedHeatTest(station.items.transformer!.id, common()))
    expect(test).toMatchObject({
      procedure: 'heat-test',
      subject: { type: 'item', id: station.items.transformer!.id, category: 'transformer' },
      finding: 'fail',
      findings: [{ band: '10 m', measure: 'peakC', powerW: 50, text: 'reached 85 °C after 8.2 min at 50 W' }],
      operator: { name: 'Volunteer' },
      recordedBy: { name: 'Volunteer' },
      instrument: { id: thermometer.id },
      claimedAhead: false,
      judgedBy: { policyNumber: 1, rule: { limits: { maxC: 85, powerW: 50 } } },
      supersededBy: null,
      proposedRecall: null,
    })
    expect(test.effects).toHaveLength(1)
    expect(test.effects[0]).toMatchObject({ kitId: station.kit.id, designation: station.kit.designation })
  })

  it('answers the same when it is read', async () => {
    const test = await recorded(volunteer, heatTest(station.items.transformer!.id, common()))
    const read = await volunteer.get(`/api/v1/tests/${test.id}`)
    expect(read.status).toBe(200)
    expect(read.body).toEqual(test)
  })
})
