import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { v7 as uuidv7 } from 'uuid'
import type { BuildFiguresAnswer } from '#shared/contracts/build-figures.ts'
import { givenBatchOf, givenBuildSheet, givenUnits, pairLoss } from '../../support/builds.ts'
import { heatTest, recorded, stoppedHeatTest } from '../../support/evidence.ts'
import { givenItem, type Item } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let keeper: TestMember
let foreign: TestMember
let thermometer: Item
let wattmeter: Item

beforeAll(async () => {
  app = await startTestApp()
  keeper = await app.givenMember(await app.givenGroup('Builders'), { roles: ['quartermaster'] })
  foreign = await app.givenMember(await app.givenGroup('Others'), { roles: ['quartermaster'] })
  thermometer = await givenItem(keeper, 'thermometer')
  wattmeter = await givenItem(keeper, 'wattmeter')
})
afterAll(() => app.close())
beforeEach(() => app.clock.advance(1, 'minutes'))

const now = () => app.clock.now().toISOString()
const metered = () => ({ performedAt: now(), instrumentId: wattmeter.id })

async function figuresOf(sheetId: string): Promise<BuildFiguresAnswer> {
  return (await keeper.get(`/api/v1/build-sheets/${sheetId}/figures`).expect(200)).body as BuildFiguresAnswer
}

/** A sheet with a batch of measured units, one for each efficiency on 10 m. */
async function givenMeasured(efficiencies: readonly number[], fields: object = {}) {
  const sheetId = await givenBuildSheet(keeper, fields)
  const batchId = await givenBatchOf(keeper, sheetId)
  const units = await givenUnits(keeper, batchId, efficiencies.length)
  for (const [at, each] of efficiencies.entries()) {
    const efficiency = { '40 m': 0.93, '10 m': each } as const
    await pairLoss(keeper, units[at]!.id, { ...metered(), efficiency })
  }
  return { sheetId, batchId, units }
}

describe('the figures of a build sheet', () => {
  it('are the newest of each unit, with median and spread by band and the limit in force', async () => {
    const { sheetId, units } = await givenMeasured([0.8, 0.9, 0.9])
    app.clock.advance(10, 'minutes')
    const [first] = units
    await pairLoss(keeper, first!.id, { ...metered(), efficiency: { '10 m': 0.88 } })
    const { bands, units: shown } = await figuresOf(sheetId)
    expect(bands.map(({ band, measure, units: count }) => [measure, band, count])).toEqual([
      ['lossDb', '40 m', 3],
      ['lossDb', '10 m', 3],
    ])
    const [, on10] = bands
    expect(on10?.highest).toBeCloseTo(-10 * Math.log10(0.88), 6)
    expect(on10?.median).toBeCloseTo(-10 * Math.log10(0.9), 6)
    expect(on10?.limit).toBeCloseTo(-10 * Math.log10(0.8), 6)
    const own = shown.find(({ id }) => id === first!.id)
    expect(own?.figures.map(({ band }) => band)).toEqual(['40 m', '10 m'])
  })

  it('hold the rise per watt of runs of one length, not of a run that was stopped', async () => {
    const sheetId = await givenBuildSheet(keeper)
    const batchId = await givenBatchOf(keeper, sheetId)
    const [cool, hot] = await givenUnits(keeper, batchId, 2)
    const common = () => ({ performedAt: now(), instrumentId: thermometer.id })
    await recorded(keeper, heatTest(cool!.id, common(), { riseK: 40 }))
    await recorded(keeper, stoppedHeatTest(hot!.id, common()))
    app.clock.advance(30, 'minutes')
    await recorded(keeper, heatTest(hot!.id, common(), { powerW: 20, riseK: 30 }))
    const { units, bands } = await figuresOf(sheetId)
    const rises = units.flatMap(({ figures }) =>
      figures.map(({ value, run }) => [value, run?.powerW, run?.minutes]),
    )
    expect(rises).toEqual([
      [0.8, 50, 10],
      [1.5, 20, 10],
    ])
    expect(bands).toMatchObject([{ band: '10 m', measure: 'kPerW', units: 2, lowest: 0.8, highest: 1.5 }])
  })

  it('name a unit that departs from its siblings, and propose nothing where all were measured together', async () => {
    const { sheetId, units } = await givenMeasured([0.9, 0.9, 0.89, 0.91, 0.82])
    const bad = units[4]!
    const { departures, proposals } = await figuresOf(sheetId)
    expect(departures).toMatchObject([
      { unit: { id: bad.id }, band: '10 m', measure: 'lossDb', isWorse: true },
    ])
    expect(departures[0]?.text).toMatch(/^loses 0\.86 dB on 10 m; the median of 5 units is 0\.46 dB/)
    expect(proposals).toEqual([])
  })

  it('are those of the group alone', async () => {
    const { sheetId, batchId } = await givenMeasured([0.9])
    await foreign.get(`/api/v1/build-sheets/${sheetId}/figures`).expect(404)
    await foreign.get(`/api/v1/build-sheets/${sheetId}/comparison`).expect(404)
    await foreign.get(`/api/v1/batches/${batchId}/recalls`).expect(404)
    const own = await givenBuildSheet(foreign)
    await foreign.get(`/api/v1/build-sheets/${own}/comparison?with=${sheetId}`).expect(404)
    const empty = await foreign.get(`/api/v1/build-sheets/${own}/figures`).expect(200)
    expect(empty.body).toMatchObject({ units: [], bands: [], departures: [], proposals: [] })
  })

  it('leave out a test that was corrected', async () => {
    const { sheetId, units } = await givenMeasured([0.9])
    const wrong = await pairLoss(keeper, units[0]!.id, { ...metered(), efficiency: { '10 m': 0.5 } })
    const body = {
      procedure: 'pair-loss',
      itemId: units[0]!.id,
      ...metered(),
      method: 'Pair back to back',
      inputs: { meters: 'one-moved', bands: [{ band: '10 m', inW: 50, outW: 50 * 0.92 ** 2 }] },
      supersedes: { testId: wrong.id, reason: 'Read the wrong scale' },
    }
    await recorded(keeper, body)
    const on10 = (await figuresOf(sheetId)).bands.find(({ band }) => band === '10 m')
    expect(on10?.median).toBeCloseTo(-10 * Math.log10(0.92), 6)
  })
})

describe('build sheets side by side', () => {
  it('are ranked, with the mean without the worst band, unusable bands and the cost', async () => {
    const good = await givenMeasured([0.9, 0.91], { winding: { materialsCost: 14.5, currency: 'USD' } })
    const dead = await givenMeasured([0.25])
    const path = `/api/v1/build-sheets/${dead.sheetId}/comparison?with=${good.sheetId}`
    const { body } = await keeper.get(path).expect(200)
    expect(body.bands).toEqual(['40 m', '10 m'])
    expect(body.builds).toMatchObject([
      {
        sheet: { id: good.sheetId },
        rank: 1,
        units: 2,
        unusableBands: [],
        materialsCost: 14.5,
        currency: 'USD',
      },
      { sheet: { id: dead.sheetId }, rank: 2, units: 1, unusableBands: ['10 m'], worstBand: '10 m' },
    ])
    const [, last] = body.builds
    expect(last.meanWithoutWorstDb).toBeCloseTo(-10 * Math.log10(0.93), 6)
    expect(body.heat).toEqual({ verdict: 'not-compared', run: null })
  })

  it('says why nothing can be compared, and what was left out', async () => {
    const [one, other] = [await givenMeasured([0.9]), await givenBuildSheet(keeper, { name: 'Never built' })]
    const { body } = await keeper
      .get(`/api/v1/build-sheets/${other}/comparison?with=${one.sheetId}`)
      .expect(200)
    expect(body).toMatchObject({ builds: [], notes: ['A comparison takes two builds or more.'] })
    expect(body.leftOut).toHaveLength(2)
  })

  it('refuses what is no list of ids, and too many', async () => {
    const sheetId = await givenBuildSheet(keeper)
    const path = `/api/v1/build-sheets/${sheetId}/comparison`
    await keeper.get(`${path}?with=none`).expect(400)
    await keeper.get(`${path}?with=${Array.from({ length: 6 }, () => uuidv7()).join(',')}`).expect(400)
  })
})

describe('a unit that departs later than its siblings were measured', () => {
  it('proposes the recall of its batch', async () => {
    const { sheetId, batchId, units } = await givenMeasured([0.9, 0.9, 0.89, 0.91, 0.9])
    const bad = units[4]!
    app.clock.advance(2, 'days')
    keeper = await app.givenMember({ id: keeper.groupId, name: '' }, { roles: ['quartermaster'] })
    await pairLoss(keeper, bad.id, { ...metered(), efficiency: { '10 m': 0.82 } })
    expect((await figuresOf(sheetId)).proposals).toMatchObject([
      {
        batch: { id: batchId },
        procedure: 'pair-loss',
        band: '10 m',
        causes: [{ unit: { id: bad.id }, kind: 'departs' }],
        siblings: units.slice(0, 4).map(({ id }) => ({ id })),
      },
    ])
  })
})
