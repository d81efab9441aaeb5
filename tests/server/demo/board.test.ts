import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { BoardAnswer } from '#shared/contracts/board.ts'
import type { KitReadiness } from '#shared/contracts/kit-readiness.ts'
import type { Availability, Band, Verdict } from '#shared/engine/vocabulary.ts'
import { LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'
import type { TestMember } from '../../support/test-app.ts'
import { TABLE_6 } from './table-6.ts'

let demo: DemoApp
let ines: TestMember
let board: BoardAnswer

beforeAll(async () => {
  demo = await startDemoApp()
  ines = await demo.as('ines')
  board = (await ines.get('/api/v1/board?size=200')).body as BoardAnswer
}, LOADING_MS)
afterAll(() => demo.close())

async function readiness(designation: string): Promise<KitReadiness> {
  const answer = await ines.get(`/api/v1/kits/${await demo.idOf(designation)}/readiness`)
  expect(answer.status).toBe(200)
  return answer.body as KitReadiness
}

const says = (cause: string) => (text: string) =>
  cause.split(' + ').every((part) => text.toLowerCase().includes(part.toLowerCase()))

describe('the board of the demo at D0', () => {
  it('shows every kit as table 6 has it', () => {
    const shown = board.rows.map(({ designation, availability, verdict }) => [
      designation,
      { availability, verdict },
    ])
    const told = Object.entries(TABLE_6).map(([designation, { availability, verdict }]) => [
      designation,
      { availability, verdict },
    ])
    expect(Object.fromEntries(shown)).toEqual(Object.fromEntries(told))
  })

  for (const [designation, { causes }] of Object.entries(TABLE_6)) {
    it(
      causes.length > 0 ? `names every cause at ${designation}` : `has nothing against ${designation}`,
      async () => {
        const { period } = await readiness(designation)
        const texts = period.reasons.filter(({ level }) => level !== 'note').map(({ text }) => text)
        if (causes.length === 0) expect(texts).toEqual([])
        for (const cause of causes)
          expect(texts.some(says(cause)), `${cause} in:\n${texts.join('\n')}`).toBe(true)
      },
    )
  }

  const count = (verdict?: Verdict, availability?: Availability, station?: boolean) =>
    board.counts
      .filter((cell) => verdict === undefined || cell.verdict === verdict)
      .filter((cell) => availability === undefined || cell.availability === availability)
      .filter((cell) => station === undefined || cell.station === station)
      .reduce((sum, { n }) => sum + n, 0)

  it('counts 8 proven, 8 with limits, 3 not proven and 5 not fit', () => {
    expect([count('proven'), count('proven-with-limits'), count('not-proven'), count('not-fit')]).toEqual([
      8, 8, 3, 5,
    ])
  })

  it('counts 15 available, 2 assigned and 7 out of service', () => {
    const all = (['available', 'assigned', 'out-of-service'] as const).map((one) => count(undefined, one))
    expect(all).toEqual([15, 2, 7])
  })

  it('counts 12 of 20 stations that can go, 7 of them with limits, 2 out on issue and 6 that cannot be used', () => {
    expect(count(undefined, undefined, true)).toBe(20)
    expect([count('proven', 'available', true), count('proven-with-limits', 'available', true)]).toEqual([
      5, 7,
    ])
    expect(count('proven', 'assigned', true)).toBe(2)
    expect([count('not-proven', 'out-of-service', true), count('not-fit', 'out-of-service', true)]).toEqual([
      2, 4,
    ])
  })

  it('is the same for an observer of the agency', async () => {
    const seen = (await (await demo.as('dana')).get('/api/v1/board?size=200')).body as BoardAnswer
    expect(seen.counts).toEqual(board.counts)
  })
})

describe('what the kits of the demo can do at D0', () => {
  const HOURS = { 'K-01': 17, 'K-02': 17, 'K-09': 12.7, 'K-16': 12.1, 'K-19': 13 }
  it.each(Object.entries(HOURS))('gives %s %d h', async (designation, hours) => {
    const { period } = await readiness(designation)
    expect(Math.abs((period.capability.hours ?? 0) - hours)).toBeLessThanOrEqual(0.3)
  })

  it('gives K-21 353 usable Ah and K-22 about 82', async () => {
    expect((await readiness('K-21')).period.capability.usableAh).toBeCloseTo(352.8, 1)
    expect((await readiness('K-22')).period.capability.usableAh).toBeCloseTo(82, 1)
  })

  const WATTS: [designation: string, band: Band, least: number, most: number][] = [
    ['K-01', '40 m', 84.5, 85.5],
    ['K-01', '10 m', 70.5, 71.5],
    ['K-04', '10 m', 11.5, 12.5],
    ['K-05', '10 m', 11.5, 12.5],
    ['K-09', '2 m', 35.5, 36.5],
    ['K-16', '40 m', 41.5, 42.5],
    ['K-20', '2 m', 24, 25],
  ]
  it.each(WATTS)(
    'puts the power of %s on %s between %d and %d W at the antenna',
    async (designation, band, least, most) => {
      const { period } = await readiness(designation)
      const watts = period.capability.bands.find((one) => one.band === band)?.wattsAtAntenna ?? 0
      expect(watts).toBeGreaterThanOrEqual(least)
      expect(watts).toBeLessThanOrEqual(most)
    },
  )

  it('leaves K-07 its bands but 40 m', async () => {
    const { period } = await readiness('K-07')
    const states = period.capability.bands.map(({ band, state }) => `${band} ${state}`)
    expect(states).toEqual(['40 m out', '20 m proven', '15 m proven', '10 m proven'])
  })
})
