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
  it('debug', async () => {
    for (const need of [FULL, {...FULL, hours: ''}, {...FULL, mains: 'true'}, {mode:'digital'}, {bands:'2 m'}, {...FULL, asOf: '2027-06-01T00:00:00Z'}]) {
    const a = await answer(Object.fromEntries(Object.entries(need).filter(([,v])=>v)))
    console.log(JSON.stringify(need), named(a.can), JSON.stringify(a, null, 1)) }
    console.log(board.rows.map(r=>[r.designation,r.verdict,r.availability,r.bandCodes,r.hours].join(' ')).join('\n'))
  })
})
