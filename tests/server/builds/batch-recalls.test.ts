import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { BatchRecall, RecallProposal } from '#shared/contracts/recall-shapes.ts'
import { givenBatchOf, givenBuildSheet, givenUnits, pairLoss } from '../../support/builds.ts'
import { heatTest, inspection, recorded, stoppedHeatTest } from '../../support/evidence.ts'
import {
  givenItem,
  givenKit,
  givenKitKind,
  into,
  moved,
  position,
  type Item,
} from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let keeper: TestMember
let foreign: TestMember
let thermometer: Item
let wattmeter: Item

beforeAll(async () => {
  app = await startTestApp()
  keeper = await app.givenMember(await app.givenGroup('Recallers'), {
    roles: ['quartermaster'],
    name: 'Keeper',
  })
  foreign = await app.givenMember(await app.givenGroup('Others'), { roles: ['quartermaster'] })
  thermometer = await givenItem(keeper, 'thermometer')
  wattmeter = await givenItem(keeper, 'wattmeter')
})
afterAll(() => app.close())
beforeEach(() => app.clock.advance(10, 'seconds'))

const now = () => app.clock.now().toISOString()
const metered = () => ({ performedAt: now(), instrumentId: wattmeter.id })
const common = () => ({ performedAt: now(), instrumentId: thermometer.id })
const later = () => app.clock.advance(20, 'seconds')

interface Recalls {
  recalls: BatchRecall[]
  proposals: RecallProposal[]
}
const recallsOf = async (batchId: string) =>
  (await keeper.get(`/api/v1/batches/${batchId}/recalls`).expect(200)).body as Recalls

async function givenBatch(units: number) {
  const batchId = await givenBatchOf(keeper, await givenBuildSheet(keeper))
  return { batchId, units: await givenUnits(keeper, batchId, units) }
}

const recall = (batchId: string, fields: object = {}) =>
  keeper.post(`/api/v1/batches/${batchId}/recall`, {
    band: '10 m',
    reason: 'A sibling failed',
    dueOn: '2026-08-01',
    ...fields,
  })

describe('a failed unit', () => {
  it('proposes a recall that lists the siblings with the kits they sit in', async () => {
    const { batchId, units } = await givenBatch(3)
    const [bad, packed, spare] = units
    const kind = await givenKitKind(keeper, { positions: [position('transformer')] })
    const kit = await givenKit(keeper, kind)
    await moved(keeper, packed!, into(kit, 'transformer'))
    await recorded(keeper, stoppedHeatTest(bad!.id, common()))
    const { proposals } = await recallsOf(batchId)
    expect(proposals).toMatchObject([
      { procedure: 'heat-test', band: '10 m', causes: [{ unit: { id: bad!.id }, kind: 'failed' }] },
    ])
    expect(proposals[0]?.siblings.map(({ id, kit: at }) => [id, at?.designation ?? null])).toEqual([
      [packed!.id, kit.designation],
      [spare!.id, null],
    ])
  })

  it('puts its siblings in doubt until each is tested, and then the recall has ended by itself', async () => {
    const { batchId, units } = await givenBatch(3)
    const [bad, one, two] = units
    await pairLoss(keeper, one!.id, { ...metered(), efficiency: { '10 m': 0.9, '40 m': 0.93 } })
    await recorded(keeper, stoppedHeatTest(bad!.id, common()))
    later()
    await recall(batchId).expect(200)
    const open = await recallsOf(batchId)
    expect(open.proposals).toEqual([])
    expect(open.recalls).toMatchObject([
      { waiting: 2, raisedBy: 'Keeper', dueOn: '2026-08-01', band: '10 m' },
    ])
    const sheet = (await keeper.get(`/api/v1/batches/${batchId}`)).body.buildSheet.id as string
    const { body } = await keeper.get(`/api/v1/build-sheets/${sheet}/figures`)
    const figures = body.units.find(({ id }: { id: string }) => id === one!.id).figures
    expect(
      figures.map(({ band, isInDoubt }: { band: string; isInDoubt: boolean }) => [band, isInDoubt]),
    ).toEqual([
      ['40 m', false],
      ['10 m', true],
    ])

    later()
    const passed = await recorded(keeper, heatTest(one!.id, common()))
    expect((await recallsOf(batchId)).recalls[0]).toMatchObject({ waiting: 1 })
    later()
    await recorded(keeper, heatTest(two!.id, common()))
    const [ended] = (await recallsOf(batchId)).recalls
    expect(ended?.waiting).toBe(0)
    expect(ended?.units.find(({ id }) => id === one!.id)).toMatchObject({
      state: 'tested',
      finding: 'pass',
      testId: passed.id,
    })
  })

  it('is no reason to ask a unit that is broken, retired, or tested since', async () => {
    const { batchId, units } = await givenBatch(4)
    const [bad, broken, tested, asked] = units
    await recorded(keeper, stoppedHeatTest(bad!.id, common()))
    await recorded(keeper, inspection(broken!.id, now(), 'Core cracked'))
    later()
    await recorded(keeper, heatTest(tested!.id, common()))
    const { proposals } = await recallsOf(batchId)
    expect(proposals[0]?.siblings.map(({ id }) => id)).toEqual([asked!.id])
  })

  it('proposes nothing once a test at full power has passed', async () => {
    const { batchId, units } = await givenBatch(2)
    const [bad] = units
    await recorded(keeper, stoppedHeatTest(bad!.id, common()))
    later()
    await recorded(keeper, heatTest(bad!.id, common(), { powerW: 20, riseK: 30 }))
    expect((await recallsOf(batchId)).proposals).toHaveLength(1)
    later()
    await recorded(keeper, heatTest(bad!.id, common()))
    expect((await recallsOf(batchId)).proposals).toEqual([])
  })
})

describe('a unit that loses too much', () => {
  it('proposes a recall by its own procedure, which a loss test of the others answers', async () => {
    const { batchId, units } = await givenBatch(2)
    const [bad, sibling] = units
    const failed = await pairLoss(keeper, bad!.id, {
      ...metered(),
      efficiency: { '40 m': 0.93, '10 m': 0.7 },
    })
    expect(failed.proposedRecalls).toMatchObject([{ procedure: 'pair-loss', band: '10 m' }])
    later()
    await recall(batchId, { procedure: 'pair-loss' }).expect(200)
    expect((await recallsOf(batchId)).recalls).toMatchObject([{ procedure: 'pair-loss', waiting: 1 }])
    later()
    await recorded(keeper, heatTest(sibling!.id, common()))
    expect((await recallsOf(batchId)).recalls[0]?.waiting).toBe(1)
    await pairLoss(keeper, sibling!.id, { ...metered(), efficiency: { '40 m': 0.7 } })
    expect((await recallsOf(batchId)).recalls[0]?.waiting).toBe(1)
    await pairLoss(keeper, sibling!.id, { ...metered(), efficiency: { '10 m': 0.9 } })
    expect((await recallsOf(batchId)).recalls[0]?.waiting).toBe(0)
  })
})

describe('a recall', () => {
  it('of the whole unit waits for every band that the unit is for', async () => {
    const batchId = await givenBatchOf(keeper, await givenBuildSheet(keeper))
    const details = { category: 'transformer', bands: ['40 m', '10 m'] }
    const unit = await givenItem(keeper, 'transformer', { batchId, details })
    await recall(batchId, { band: null }).expect(200)
    later()
    await recorded(keeper, heatTest(unit.id, common(), { band: '10 m' }))
    expect((await recallsOf(batchId)).recalls[0]?.waiting).toBe(1)
    await recorded(keeper, heatTest(unit.id, common(), { band: '40 m' }))
    expect((await recallsOf(batchId)).recalls[0]?.waiting).toBe(0)
  })

  it('of the whole unit has found what the worst of its bands showed', async () => {
    const batchId = await givenBatchOf(keeper, await givenBuildSheet(keeper))
    const details = { category: 'transformer', bands: ['40 m', '10 m'] }
    const unit = await givenItem(keeper, 'transformer', { batchId, details })
    await recall(batchId, { band: null }).expect(200)
    later()
    await recorded(keeper, heatTest(unit.id, common(), { band: '40 m' }))
    const failed = await recorded(keeper, stoppedHeatTest(unit.id, common(), '10 m'))
    expect((await recallsOf(batchId)).recalls[0]?.units).toMatchObject([
      { state: 'tested', finding: 'fail', testId: failed.id },
    ])
  })

  it('does not wait for a unit whose check was taken back, and is not proposed for it again', async () => {
    const { batchId, units } = await givenBatch(2)
    await recorded(keeper, stoppedHeatTest(units[0]!.id, common()))
    later()
    const { raised } = (await recall(batchId).expect(200)).body
    await keeper
      .post(`/api/v1/raised-checks/${raised[0].id}/withdraw`, { reason: 'Another core' })
      .expect(200)
    const { recalls, proposals } = await recallsOf(batchId)
    expect(recalls).toMatchObject([{ waiting: 0, units: [{ state: 'taken-back' }] }])
    expect(proposals).toEqual([])
  })

  it('raises each check once when two people recall at once', async () => {
    const { batchId } = await givenBatch(3)
    const answers = await Promise.all([recall(batchId), recall(batchId)])
    const counts = answers.map(({ body }) => body.raised.length as number)
    expect(counts.sort()).toEqual([0, 3])
  })

  it('asks for a test that is made of such things, in the own group only', async () => {
    const { batchId } = await givenBatch(1)
    const wrong = await recall(batchId, { procedure: 'antenna-sweep' })
    expect(wrong.body.errors[0].pointer).toBe('#/procedure')
    const body = { band: '10 m', reason: 'Not ours', dueOn: '2026-08-01' }
    expect((await foreign.post(`/api/v1/batches/${batchId}/recall`, body)).status).toBe(404)
  })
})
