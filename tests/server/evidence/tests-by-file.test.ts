/** Tests that are read from uploaded files, end to end: what is stored, what is answered, what is refused. */
import { v7 as uuidv7 } from 'uuid'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { TestForm } from '#shared/contracts/test-form.ts'
import { fullCount, givenStation, newTestId, recorded, type Station } from '../../support/evidence.ts'
import { givenItem, type Item } from '../../support/registry.ts'
import {
  antennaFile,
  openLineFile,
  pairFile,
  termination,
  throughLineFile,
  TRANSFORMER,
} from '../../support/sweep-files.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'
import { uploaded } from '../../support/uploads.ts'

let app: TestApp
let keeper: TestMember
let analyzer: Item
let thermometer: Item
let station: Station
let antenna: Item
let feedline: Item
let stranger: TestMember

beforeAll(async () => {
  app = await startTestApp()
  const group = await app.givenGroup('Evidence')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  stranger = await app.givenMember(await app.givenGroup('Elsewhere'))
  analyzer = await givenItem(keeper, 'analyzer')
  thermometer = await givenItem(keeper, 'thermometer')
  station = await givenStation(keeper, {
    details: {
      transformer: { turnsPrimary: 2, turnsSecondary: 14, coreMassG: 117.6, ratedWatts: 100 },
    },
  })
  antenna = await givenItem(keeper, 'antenna')
  const details = { category: 'feedline', cable: 'RG-8X', lengthM: 15 }
  feedline = await givenItem(keeper, 'feedline', { details })
})
afterAll(() => app.close())
beforeEach(() => app.clock.advance(1, 'minutes'))

const file = (text: string, name: string) => uploaded(app, keeper, { kind: 'touchstone', bytes: text, name })

const common = (instrument = analyzer) => ({
  performedAt: app.clock.now().toISOString(),
  method: 'By the book',
  instrumentId: instrument.id,
})
const put = (body: object, testId = newTestId()) => keeper.put(`/api/v1/tests/${testId}`, body)
const transformerId = () => station.items.transformer!.id

async function openShortLoad(swapped = false) {
  const ids = await Promise.all([
    file(termination('open'), 'XFM open.s1p'),
    file(termination('short'), 'XFM short.s1p'),
    file(termination('load'), 'XFM load.s1p'),
  ])
  const [open, short, load] = swapped ? [ids[2], ids[1], ids[0]] : ids
  return {
    procedure: 'open-short-load',
    itemId: transformerId(),
    ...common(),
    inputs: { open, short, load, loadOhm: 2450, bands: ['80 m', '40 m', '20 m', '10 m'] },
  }
}

describe('an open, short and load sweep', () => {
  it('answers an efficiency for each band with its uncertainty and keeps the three files', async () => {
    const body = await openShortLoad()
    const test = await recorded(keeper, body)
    expect(test.finding).toBe('pass')
    expect(test.findings.map(({ band, value, uncertainty }) => [band, value, uncertainty])).toEqual([
      ['80 m', expect.closeTo(0.82461, 4), expect.closeTo(0.01714, 4)],
      ['40 m', expect.closeTo(0.825579, 4), expect.closeTo(0.01621, 4)],
      ['20 m', expect.closeTo(0.828957, 4), expect.closeTo(0.0176, 4)],
      ['10 m', expect.closeTo(0.841936, 4), expect.closeTo(0.02476, 4)],
    ])
    expect(test.attachments.map(({ id, role }) => [id, role])).toEqual([
      [body.inputs.open, 'open'],
      [body.inputs.short, 'short'],
      [body.inputs.load, 'load'],
    ])
    expect(test.effects[0]?.kitId).toBe(station.kit.id)
    expect((await keeper.get(`/api/v1/tests/${test.id}`)).body).toEqual(test)
  })

  it('is refused with its field when a file is in the wrong place, and nothing is stored', async () => {
    const testId = newTestId()
    const answer = await put(await openShortLoad(true), testId)
    expect([answer.status, answer.body.errors]).toEqual([
      422,
      [{ pointer: '#/inputs/load', detail: expect.stringContaining('is the load') as string }],
    ])
    await keeper.get(`/api/v1/tests/${testId}`).expect(404)
  })

  it('recorded twice is one test, with other files it is another', async () => {
    const body = await openShortLoad()
    const testId = newTestId()
    const first = await recorded(keeper, body, testId)
    expect(await recorded(keeper, body, testId)).toEqual(first)
    expect((await put({ ...(await openShortLoad()), performedAt: body.performedAt }, testId)).status).toBe(
      409,
    )
  })
})

describe('a file that a test names', () => {
  const pair = (id: string, more: object = {}) => ({
    procedure: 'pair-loss',
    itemId: transformerId(),
    ...common(),
    inputs: { source: 'file', file: id, bands: ['40 m', '20 m'] },
    ...more,
  })

  it('must be there, in the own group and of the right kind', async () => {
    const theirs = await uploaded(app, stranger, { kind: 'touchstone', bytes: pairFile(), name: 'a.s2p' })
    const csv = await uploaded(app, keeper, { kind: 'csv', bytes: 'a,b\n1,2\n' })
    for (const id of [uuidv7(), theirs, csv]) {
      const answer = await put(pair(id))
      expect([answer.status, answer.body.errors?.[0].pointer]).toEqual([422, '#/inputs/file'])
    }
    const beside = await put(pair(await file(pairFile(), 'a.s2p'), { attachmentIds: [csv, uuidv7()] }))
    expect([beside.status, beside.body.errors?.[0].pointer]).toEqual([422, '#/attachmentIds/1'])
  })

  it('of ten at most, each once', async () => {
    const id = await file(pairFile(), 'a.s2p')
    const many = Array.from({ length: 11 }, () => uuidv7())
    expect((await put(pair(id, { attachmentIds: many }))).status).toBe(422)
    expect((await put(pair(id, { attachmentIds: [id, id] }))).status).toBe(422)
    const same = await recorded(keeper, pair(id, { attachmentIds: [id] }))
    expect(same.attachments.map(({ role }) => role)).toEqual(['file'])
  })

  it('gives both directions and both figures of a pair', async () => {
    const test = await recorded(keeper, pair(await file(pairFile(), 'a.s2p')))
    const [row] = test.results.bands as Record<string, number>[]
    expect(row).toMatchObject({
      band: '40 m',
      lossDb: expect.closeTo(TRANSFORMER.points[1]!.pair.lossDb, 6) as number,
      differenceDb: expect.closeTo(0, 9) as number,
    })
    expect(row!.insertionLossDb).toBeGreaterThan(row!.lossDb!)
  })

  it('names the field of an input that is not there, whichever way it is entered', async () => {
    const byFile = await put({ ...pair(uuidv7()), inputs: { source: 'file', bands: ['40 m'] } })
    expect(byFile.body.errors?.[0].pointer).toBe('#/inputs/file')
    const bands = [{ band: '40 m', inW: -1, outW: 1 }]
    const byHand = await put({ ...pair(uuidv7()), inputs: { meters: 'two', bands } })
    expect(byHand.body.errors?.[0].pointer).toBe('#/inputs/bands/0/inW')
    const other = await put({ ...pair(uuidv7()), inputs: { source: 'guess', bands } })
    expect(other.body.errors?.[0].pointer).toBe('#/inputs/source')
  })
})

describe('an antenna sweep by file', () => {
  const sweep = async (resonance: { ohm: number; q: number; mhz: number }, more: object = {}) => ({
    procedure: 'antenna-sweep',
    itemId: antenna.id,
    ...common(),
    inputs: { source: 'file', file: await file(antennaFile(resonance), 'ant.s1p'), bands: ['40 m'], ...more },
  })

  it('is compared with the first one, and the form knows it', async () => {
    const first = await recorded(keeper, await sweep({ ohm: 45, q: 11, mhz: 7.12 }))
    expect(first.results.drift).toBeUndefined()
    app.clock.advance(1, 'days')
    const { body } = await keeper.get(`/api/v1/items/${antenna.id}/test-form?procedure=antenna-sweep`)
    expect((body as TestForm).known.sweep.baseline).toMatchObject({
      testId: first.id,
      file: first.attachments[0]?.id,
      worst: [{ band: '40 m' }],
    })
    const second = await recorded(keeper, await sweep({ ohm: 52, q: 10, mhz: 7.03 }))
    const drift = second.results.drift as { baselineTestId: string; bands: { lowestShiftHz: number }[] }
    expect(drift.baselineTestId).toBe(first.id)
    expect(drift.bands[0]?.lowestShiftHz).toBeLessThan(0)
    app.clock.advance(1, 'days')
    const anew = await recorded(keeper, await sweep({ ohm: 50, q: 10, mhz: 7.1 }, { setsBaseline: true }))
    expect(anew.results.drift).toBeUndefined()
    app.clock.advance(1, 'days')
    const third = await recorded(keeper, await sweep({ ohm: 50, q: 10, mhz: 7.1 }))
    expect((third.results.drift as { baselineTestId: string }).baselineTestId).toBe(anew.id)
  })
})

describe('a feedline by file', () => {
  it('is judged from the baseline that a file set, and against new cable', async () => {
    const line = async (text: string, farEnd: string, more: object = {}) => ({
      procedure: 'feedline-loss',
      itemId: feedline.id,
      ...common(),
      inputs: { source: 'file', file: await file(text, 'line.txt'), bands: ['2 m'], farEnd, ...more },
    })
    const swrAtRadio = (swr: number) => ({ swrAtRadio: [{ band: '2 m', swr }] })
    await recorded(
      keeper,
      await line(throughLineFile(2.2), 'second-port', { setsBaseline: true, ...swrAtRadio(1.8) }),
    )
    app.clock.advance(1, 'days')
    const wet = await recorded(keeper, await line(openLineFile(3.4), 'open', swrAtRadio(1.4)))
    expect(wet).toMatchObject({
      finding: 'fail',
      findings: [{ measure: 'lossDb', value: expect.closeTo(3.4, 3) as number }],
    })
    const { warnings, againstNew } = wet.results as {
      warnings: { code: string }[]
      againstNew: { newDb: number }[]
    }
    expect(warnings.map(({ code }) => code)).toContain('W_SWR_FLATTERS')
    expect(againstNew[0]?.newDb).toBeCloseTo(2.2, 1)
  })
})

describe('a heat test after a loss test', () => {
  it('takes the efficiency in force and says what each mode allows', async () => {
    const readings = [21.7, 31.8, 39.9, 46.7, 52.7, 57.8, 61.7, 64.8, 67.3, 69.8, 71.5, 72.5]
    const test = await recorded(keeper, {
      procedure: 'heat-test',
      itemId: transformerId(),
      ...common(thermometer),
      inputs: {
        band: '20 m',
        powerW: 100,
        load: 'fixture-2450',
        enclosure: 'closed',
        ambientC: 21.5,
        readings: readings.map((temperatureC, n) => ({ atS: n * 60, temperatureC })),
        keyUpAtS: 660,
        stoppedAtLimit: false,
      },
    })
    expect(test.results).toMatchObject({
      fit: { identifiable: true },
      efficiencyUsed: { efficiency: expect.any(Number) as number },
      resistance: { kPerW: expect.any(Number) as number },
      allowance: {
        sentence: expect.stringMatching(
          /^On a day of 35 °C, to get no hotter than 85 °C: voice at 100 W/,
        ) as string,
      },
    })
  })
})

describe('an on-air check', () => {
  it('passes a band that was answered and fails one that was not', async () => {
    await recorded(keeper, fullCount(station.kit, app.clock.now().toISOString()))
    const test = await recorded(keeper, {
      procedure: 'on-air-check',
      kitId: station.kit.id,
      performedAt: app.clock.now().toISOString(),
      method: 'Contact on the air',
      inputs: {
        contacts: [
          {
            band: '40 m',
            powerW: 50,
            answered: true,
            answeredBy: 'the relief station',
            reportReceived: '57',
          },
          { band: '20 m', powerW: 50, answered: false },
        ],
      },
    })
    expect(test.findings.map(({ band, finding, text }) => [band, finding, text])).toEqual([
      ['40 m', 'pass', 'answered by the relief station at 50 W, report 57'],
      ['20 m', 'fail', 'nobody answered at 50 W'],
    ])
  })
})
