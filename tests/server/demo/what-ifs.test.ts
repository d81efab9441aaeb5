import { v7 as uuidv7 } from 'uuid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { BoardAnswer } from '#shared/contracts/board.ts'
import { LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'
import { calibration, fullCount, recorded } from '../../support/evidence.ts'
import type { Item, Kit } from '../../support/registry.ts'
import type { TestMember } from '../../support/test-app.ts'
import { inDoubtByCalibration } from './doubted-results.ts'

/** Facts 8 and 13: what the group could do on the evening of D0. */

let demo: DemoApp
let tobin: TestMember

beforeAll(async () => {
  demo = await startDemoApp()
  tobin = await demo.as('tobin')
}, LOADING_MS)
afterAll(() => demo.close())

async function board(): Promise<BoardAnswer> {
  return (await tobin.get('/api/v1/board?size=200')).body as BoardAnswer
}

async function verdictOf(designation: string): Promise<string | undefined> {
  return (await board()).rows.find((row) => row.designation === designation)?.verdict
}

async function read<T>(kind: 'kits' | 'items', designation: string): Promise<T> {
  return (await tobin.get(`/api/v1/${kind}/${await demo.idOf(designation)}`)).body as T
}

async function move(item: Item, to: object): Promise<void> {
  const from = item.kit
    ? { kind: 'position', kitId: item.kit.id, positionId: item.position!.id }
    : { kind: 'place', placeId: item.place!.id }
  const answer = await tobin.post(`/api/v1/items/${item.id}/moves`, {
    moveId: uuidv7(),
    from,
    to,
    reason: '',
  })
  expect(answer.status, JSON.stringify(answer.body)).toBe(200)
}

describe('swapping XFM-13 into K-18', () => {
  it('leaves K-18 not proven until it is counted, and makes it proven then', async () => {
    const [cracked, spare] = [await read<Item>('items', 'XFM-10'), await read<Item>('items', 'XFM-13')]
    const position = { kind: 'position', kitId: cracked.kit!.id, positionId: cracked.position!.id }
    expect(await verdictOf('K-18')).toBe('not-fit')
    await move(cracked, { kind: 'place', placeId: spare.place!.id })
    expect(await verdictOf('K-18')).toBe('not-fit')
    await move(spare, position)
    await recorded(
      tobin,
      fullCount(await read<Kit>('kits', 'K-18'), demo.app.clock.now().toISOString(), '0476'),
    )
    expect(await verdictOf('K-18')).toBe('proven')
  })

  it('makes the totals 9, 8, 3 and 4', async () => {
    const { rows } = await board()
    const count = (verdict: string) => rows.filter((row) => row.verdict === verdict).length
    const all = ['proven', 'proven-with-limits', 'not-proven', 'not-fit'].map(count)
    expect(all).toEqual([9, 8, 3, 4])
  })
})

describe('a calibration of WTM-23 that turns up late', () => {
  it('restores the four results that were in doubt', async () => {
    const wattmeter = await demo.idOf('WTM-23')
    expect(await inDoubtByCalibration(demo)).toHaveLength(4)
    await recorded(tobin, calibration(wattmeter, '2026-08-15T17:00:00Z'))
    expect(await inDoubtByCalibration(demo)).toEqual([])
  })

  it('leaves every proven kit as it was', async () => {
    const { rows } = await board()
    expect(rows.filter(({ verdict }) => verdict === 'proven')).toHaveLength(9)
  })
})
