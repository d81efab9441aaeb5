import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { BoardAnswer } from '#shared/contracts/board.ts'
import { answerNeed, type NeedAnswer } from '#shared/contracts/board-need.ts'
import { LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'
import type { TestMember } from '../../support/test-app.ts'

/** What the demo group can do of what is asked for, against the figures of section 12 of the demo scenario. */

let demo: DemoApp
let ines: TestMember
let board: BoardAnswer

beforeAll(async () => {
  demo = await startDemoApp()
  ines = await demo.as('ines')
  board = (await ines.get('/api/v1/board?size=200')).body as BoardAnswer
}, LOADING_MS)
afterAll(() => demo.close())

const FULL = { bands: '40 m', mode: 'voice', watts: '60', hours: '12' }

async function answer(need: object): Promise<NeedAnswer> {
  const reply = await ines.get('/api/v1/board/need').query(need)
  expect(reply.status, reply.text).toBe(200)
  return answerNeed.response.parse(reply.body)
}

const named = (kitIds: readonly string[]) =>
  kitIds.map((kitId) => board.rows.find((row) => row.kitId === kitId)?.designation).sort()

describe('40 m by voice, 60 W at the antenna, 12 h on own batteries', () => {
  it('is for four stations, and K-03 needs the watts that its lead withholds', async () => {
    const said = await answer(FULL)
    expect(`${said.lead} ${said.rest}`).toBe(
      '4 stations can do that; K-03 could if it gave 60 W on 40 m: 42 W now. 3 more nearly can.',
    )
    expect(named(said.can)).toEqual(['K-01', 'K-02', 'K-04', 'K-05'])
    expect(named(said.near.map(({ kitId }) => kitId))).toEqual(['K-03', 'K-06', 'K-16', 'K-17'])
  })

  it('goes from a near miss to the test behind it', async () => {
    const [nearest] = (await answer(FULL)).near
    const test = await ines.get(`/api/v1/tests/${nearest?.testId}`)
    expect(test.status).toBe(200)
  })

  it('is for K-06 as well where mains or a vehicle is at hand', async () => {
    expect(named((await answer({ ...FULL, mains: 'true' })).can)).toContain('K-06')
  })

  it('is for nobody next summer if nobody does anything', async () => {
    const said = await answer({ ...FULL, asOf: '2027-06-01T00:00:00Z' })
    expect(said.lead).toBe('None will be able to do that;')
    expect(said.rest).toMatch(
      /^K-01 could if it were proven, worked on 40 m and gave 60 W there: K-01: last count/,
    )
  })
})

describe('digital modes', () => {
  it('are left to K-16; K-17 lacks them for its computer', async () => {
    const said = await answer({ mode: 'digital' })
    expect(said.rest).toBe('K-17 could if it worked in digital modes: it does not now.')
    expect(named(said.can)).toEqual(['K-16'])
  })
})
