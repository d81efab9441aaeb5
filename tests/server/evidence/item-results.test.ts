import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { readItemResults, type ItemResult } from '#shared/contracts/item-results.ts'
import { inspection, newTestId, recorded } from '../../support/evidence.ts'
import { givenItem, type Item } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let keeper: TestMember
let stranger: TestMember
let line: Item
let analyzer: Item

beforeAll(async () => {
  app = await startTestApp({ now: '2026-06-01T12:00:00.000Z' })
  const group = await app.givenGroup('Trends')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  stranger = await app.givenMember(await app.givenGroup('Another'), { roles: ['quartermaster'] })
  analyzer = await givenItem(keeper, 'analyzer')
  line = await givenItem(keeper, 'feedline')
})
afterAll(() => app.close())

const lineTest = (performedAt: string, lossDb: number, swrAtRadio: number, more: object = {}) => ({
  procedure: 'feedline-loss' as const,
  itemId: line.id,
  performedAt,
  instrumentId: analyzer.id,
  method: 'Far end open, half the return loss',
  inputs: { readings: [{ band: '2 m' as const, lossDb, swrAtRadio }] },
  ...more,
})

async function results(by: TestMember, query = ''): Promise<ItemResult[]> {
  const answer = await by.get(`/api/v1/items/${line.id}/results${query}`)
  if (answer.status !== 200) throw new Error(`${answer.status} ${answer.text}`)
  return readItemResults.response.parse(answer.body).results
}

describe('the results of one item', () => {
  it('are none before its first test', async () => {
    expect(await results(keeper)).toEqual([])
  })

  it('come oldest first, with the limits they were judged by and the figures beside them', async () => {
    const first = await recorded(keeper, lineTest('2025-05-01T10:00:00Z', 1.4, 1.52))
    await recorded(keeper, lineTest('2026-05-01T10:00:00Z', 3.1, 1.33))
    await recorded(keeper, inspection(line.id, '2026-05-02T10:00:00Z'))
    const [one, two, three] = await results(keeper)
    expect(one).toMatchObject({ testId: first.id, performedOn: '2025-05-01', finding: 'pass' })
    expect(one).toMatchObject({ limits: { maxRiseDb: 0.8 }, intervalMonths: 12, supersededBy: null })
    expect(one!.figures).toEqual([{ band: '2 m', measure: 'swrAtRadio', value: 1.52, frequencyMHz: null }])
    expect(two!.figures).toContainEqual({
      band: '2 m',
      measure: 'baselineDb',
      value: 1.4,
      frequencyMHz: null,
    })
    expect(two).toMatchObject({ finding: 'fail', findings: [{ measure: 'lossDb', value: 3.1 }] })
    expect(three).toMatchObject({ procedure: 'inspection', figures: [] })
  })

  it('can be those of one procedure', async () => {
    const found = await results(keeper, '?procedure=inspection')
    expect(found.map(({ procedure }) => procedure)).toEqual(['inspection'])
  })

  it('keep a corrected test and say what replaced it and why', async () => {
    const id = newTestId()
    await recorded(keeper, lineTest('2026-05-20T10:00:00Z', 9.1, 1.3), id)
    const right = await recorded(
      keeper,
      lineTest('2026-05-20T10:00:00Z', 1.9, 1.3, {
        supersedes: { testId: id, reason: 'Read off the wrong line' },
      }),
    )
    const found = await results(keeper, '?procedure=feedline-loss')
    expect(found.find(({ testId }) => testId === id)?.supersededBy).toEqual({
      testId: right.id,
      reason: 'Read off the wrong line',
    })
  })

  it('are not found by members of another group', async () => {
    const answer = await stranger.get(`/api/v1/items/${line.id}/results`)
    expect(answer.status).toBe(404)
    expect(answer.body).not.toHaveProperty('results')
  })
})
