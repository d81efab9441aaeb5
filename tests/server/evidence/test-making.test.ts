import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { readTestMaking, type TestMaking } from '#shared/contracts/test-making.ts'
import { calibration, heatTest, inspection, recorded } from '../../support/evidence.ts'
import { givenItem, type Item } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let keeper: TestMember
let stranger: TestMember
let thermometer: Item
let transformer: Item
let tested: string

const START = '2026-06-01T12:00:00.000Z'

beforeAll(async () => {
  app = await startTestApp({ now: START })
  keeper = await app.givenMember(await app.givenGroup('Makers'), { roles: ['quartermaster'] })
  stranger = await app.givenMember(await app.givenGroup('Another'), { roles: ['quartermaster'] })
  const details = { category: 'thermometer', accuracyAbsolute: 1.5, resolution: 0.1, unit: '°C' }
  thermometer = await givenItem(keeper, 'thermometer', { details })
  transformer = await givenItem(keeper, 'transformer')
  await recorded(keeper, calibration(thermometer.id, '2025-05-01T10:00:00Z'))
  const heat = heatTest(transformer.id, { performedAt: '2026-05-20T10:00:00Z', instrumentId: thermometer.id })
  tested = (await recorded(keeper, heat)).id
})
afterAll(() => app.close())

async function making(by: TestMember, testId = tested): Promise<TestMaking> {
  const answer = await by.get(`/api/v1/tests/${testId}/making`)
  if (answer.status !== 200) throw new Error(`${answer.status} ${answer.text}`)
  return readTestMaking.response.parse(answer.body)
}

describe('what stands behind the figures of a test', () => {
  it('names the instrument with its accuracy and that its calibration had lapsed on that day', async () => {
    const { instrument } = await making(keeper)
    expect(instrument).toMatchObject({
      item: { id: thermometer.id },
      accuracy: { accuracyAbsolute: 1.5, resolution: 0.1 },
      unit: '°C',
      calibration: {
        state: 'lapsed',
        before: { performedOn: '2025-05-01' },
        after: null,
        untilOn: '2026-05-01',
      },
    })
  })

  it('learns from a good calibration since that the instrument had stayed right', async () => {
    await recorded(keeper, calibration(thermometer.id, '2026-05-30T10:00:00Z'))
    const { instrument } = await making(keeper)
    expect(instrument!.calibration).toMatchObject({
      state: 'confirmed',
      after: { performedOn: '2026-05-30' },
    })
  })

  it('has no instrument where none was used', async () => {
    const looked = await recorded(keeper, inspection(transformer.id, '2026-05-21T10:00:00Z'))
    expect((await making(keeper, looked.id)).instrument).toBeNull()
  })

  it('is not found by members of another group', async () => {
    expect((await stranger.get(`/api/v1/tests/${tested}/making`)).status).toBe(404)
  })
})
