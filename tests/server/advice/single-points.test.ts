import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { readSinglePoints } from '#shared/contracts/single-points.ts'
import { LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'

/** The demo group has one key of the locker, and it is abroad: the list says so, with what to do. */

let demo: DemoApp

beforeAll(async () => {
  demo = await startDemoApp()
}, LOADING_MS)
afterAll(() => demo.close())

describe('single points of the demo group', () => {
  it('begin with the one key of the locker, and no thing there are two of is named', async () => {
    const tobin = await demo.as('tobin')
    const { points } = readSinglePoints.response.parse(
      (await tobin.get('/api/v1/single-points').expect(200)).body,
    )
    expect(points[0]).toMatchObject({
      kind: 'key',
      text: expect.stringMatching(
        /^Hollis Wrenfield alone has the key of Quarry Bend Grange Locker: \d+ kits lie behind it$/,
      ),
    })
    expect(points.some(({ text }) => text.includes('Station 4 Cage'))).toBe(false)
    expect(points.some(({ text }) => text.includes('wattmeter'))).toBe(false)
    for (const { todo } of points) expect(todo).not.toBe('')
  })

  it('are told to those who answer for the group, and to nobody else', async () => {
    await (await demo.as('lupe')).get('/api/v1/single-points').expect(403)
    await (await demo.as('oona')).get('/api/v1/single-points').expect(200)
  })
})
