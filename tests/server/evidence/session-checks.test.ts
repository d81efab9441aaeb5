import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { KitReadiness } from '#shared/contracts/kit-readiness.ts'
import { calibration, givenStation, newTestId, recorded, type Station } from '../../support/evidence.ts'
import { givenItem, givenKitKind, position, type Item } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

/** An analyzer whose calibration has lapsed, a reference part, and an antenna that the analyzer swept. */

let app: TestApp
let keeper: TestMember
let member: TestMember
let analyzer: Item
let part: Item
let station: Station

const GOLDEN = {
  category: 'test-fixture',
  referenceReads: 'SWR at 7.1 MHz',
  referenceFor: 'analyzer',
  referenceValue: 1.5,
  referenceTolerance: 0.05,
}

beforeAll(async () => {
  app = await startTestApp({ now: '2026-06-01T12:00:00.000Z' })
  const group = await app.givenGroup('References')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  member = await app.givenMember(group)
  analyzer = await givenItem(keeper, 'analyzer')
  part = await givenItem(keeper, 'test-fixture', { details: GOLDEN })
  const promise = { bands: ['40 m'], modes: ['voice'], watts: 50, hours: null }
  const kind = await givenKitKind(keeper, { promise, positions: [position('antenna')] })
  station = await givenStation(keeper, { kind, details: { antenna: { bands: ['40 m'] } } })
  await recorded(member, calibration(analyzer.id, '2024-06-01T12:00:00Z'))
  await recorded(member, {
    procedure: 'antenna-sweep',
    itemId: station.items.antenna!.id,
    performedAt: now(),
    method: 'Sweep at the working points',
    instrumentId: analyzer.id,
    inputs: { points: [{ band: '40 m', frequencyMHz: 7.1, swr: 1.3 }] },
  })
})
afterAll(() => app.close())
beforeEach(() => app.clock.advance(10, 'minutes'))

const now = () => app.clock.now().toISOString()
const check = (reading: number, partId = part.id) => ({
  procedure: 'session-check' as const,
  itemId: analyzer.id,
  performedAt: now(),
  method: 'A reference part, at the start of the session',
  inputs: { partId, reading },
})
async function sweepReasons(): Promise<string> {
  const { body } = await member.get(`/api/v1/kits/${station.kit.id}/readiness`)
  const { reasons } = (body as KitReadiness).period
  return reasons.flatMap(({ text, procedure }) => (procedure === 'antenna-sweep' ? text : [])).join()
}

describe('a session check of an instrument', () => {
  it('is offered the parts of the group that are kept as references', async () => {
    const form = await member.get(`/api/v1/items/${analyzer.id}/test-form?procedure=session-check`)
    expect(form.body.known.references).toEqual([
      {
        id: part.id,
        designation: part.designation,
        for: 'analyzer',
        reads: 'SWR at 7.1 MHz',
        agreed: 1.5,
        tolerance: 0.05,
        unit: '',
      },
    ])
  })

  it('vouches for what a lapsed instrument measured, until one fails', async () => {
    expect(await sweepReasons()).toContain('had lapsed')
    const passed = await recorded(member, check(1.52))
    expect(passed).toMatchObject({ finding: 'pass', results: { part: { designation: part.designation } } })
    expect(await sweepReasons()).toBe('')
    app.clock.advance(1, 'days')
    const failed = await recorded(member, check(1.7))
    expect(failed.finding).toBe('fail')
    // What was measured before the check that passed stays vouched for.
    expect(await sweepReasons()).toBe('')
  })

  it('that failed is named on the tests it doubts, until a calibration finds the instrument good', async () => {
    app.clock.advance(1, 'days')
    const swept = await recorded(member, {
      procedure: 'antenna-sweep',
      itemId: station.items.antenna!.id,
      performedAt: now(),
      method: 'Sweep at the working points',
      instrumentId: analyzer.id,
      inputs: { points: [{ band: '40 m', frequencyMHz: 7.1, swr: 1.2 }] },
    })
    app.clock.advance(10, 'minutes')
    const { body } = await member.get(`/api/v1/tests/${swept.id}/making`)
    expect(body.instrument.calibration).toMatchObject({ state: 'check-failed', check: { finding: 'fail' } })
    await recorded(member, calibration(analyzer.id, now()))
    const after = await member.get(`/api/v1/tests/${swept.id}/making`)
    expect(after.body.instrument.calibration).toMatchObject({ state: 'confirmed', check: null })
    expect(await sweepReasons()).toBe('')
  })

  it('needs a reference part of its own group', async () => {
    const other = await app.givenMember(await app.givenGroup('Others'), { roles: ['quartermaster'] })
    const theirs = await givenItem(other, 'test-fixture', { details: GOLDEN })
    for (const partId of [theirs.id, station.items.antenna!.id]) {
      const answer = await member.put(`/api/v1/tests/${newTestId()}`, check(1.5, partId))
      expect(answer.status).toBe(422)
      expect(answer.body.errors).toMatchObject([{ pointer: '#/inputs/partId' }])
    }
  })

  it('is not done to what is no instrument', async () => {
    const body = { ...check(1.5), itemId: station.items.antenna!.id }
    expect((await member.put(`/api/v1/tests/${newTestId()}`, body)).status).toBe(422)
  })
})
