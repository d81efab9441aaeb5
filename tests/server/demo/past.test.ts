import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { BoardAnswer } from '#shared/contracts/board.ts'
import type { KitReadiness } from '#shared/contracts/kit-readiness.ts'
import { unpackBands } from '#shared/engine/readiness/band-codes.ts'
import { LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'
import type { TestMember } from '../../support/test-app.ts'

/** Fact 4: the past is read as it was known then. */

let demo: DemoApp
let ines: TestMember

beforeAll(async () => {
  demo = await startDemoApp()
  ines = await demo.as('ines')
}, LOADING_MS)
afterAll(() => demo.close())

/** Local midnight of the group. */
const midnight = (day: string) => `${day}T07:00:00Z`

async function boardOf(day: string): Promise<BoardAnswer> {
  const answer = await ines.get(`/api/v1/board?size=200&asOf=${midnight(day)}`)
  expect(answer.status).toBe(200)
  return answer.body as BoardAnswer
}

async function bandsOn(day: string, designation: string): Promise<Record<string, string>> {
  const row = (await boardOf(day)).rows.find((one) => one.designation === designation)
  return Object.fromEntries(unpackBands(row?.bandCodes ?? '').map(({ band, state }) => [band, state]))
}

async function reasonsOn(day: string, designation: string): Promise<string[]> {
  const path = `/api/v1/kits/${await demo.idOf(designation)}/readiness?asOf=${midnight(day)}`
  return ((await ines.get(path)).body as KitReadiness).period.reasons.map(({ text }) => text)
}

const ALL_PROVEN = { '40 m': 'proven', '20 m': 'proven', '15 m': 'proven', '10 m': 'proven' }

describe('the board of 1 January 2026', () => {
  it('is told as known then', async () => {
    expect(await boardOf('2026-01-01')).toMatchObject({ computedFor: 'past', total: 24 })
  })

  it('has 40 m at K-07', async () => {
    expect((await bandsOn('2026-01-01', 'K-07'))['40 m']).toBe('proven')
  })

  it.each(['K-04', 'K-05', 'K-08'])('has no limit on any band at %s', async (designation) => {
    expect(await bandsOn('2026-01-01', designation)).toEqual(ALL_PROVEN)
  })

  it('has both bands of K-18', async () => {
    expect(await bandsOn('2026-01-01', 'K-18')).toEqual({ '40 m': 'proven', '20 m': 'proven' })
  })

  it('had the former transformers in the four kits', async () => {
    const rows = await demo.rows<{ kit: string; item: string }>(
      `SELECT k.designation AS kit, i.designation AS item FROM movement m
        JOIN item i ON i.id = m.item_id JOIN kit k ON k.id = m.to_kit_id
        WHERE i.category = 'transformer' AND m.moved_at < '2026-01-01' AND k.designation IN ('K-04', 'K-05', 'K-08', 'K-18')
          AND NOT EXISTS (SELECT FROM movement l WHERE l.item_id = m.item_id AND l.from_kit_id = m.to_kit_id
            AND l.moved_at < '2026-01-01')
        ORDER BY 1`,
    )
    expect(rows).toEqual([
      { kit: 'K-04', item: 'XFM-81' },
      { kit: 'K-05', item: 'XFM-82' },
      { kit: 'K-08', item: 'XFM-83' },
      { kit: 'K-18', item: 'XFM-84' },
    ])
  })
})

describe('the board of 1 July 2026', () => {
  it('limits K-04 on 10 m by its own failed test', async () => {
    expect(await bandsOn('2026-07-01', 'K-04')).toEqual({ ...ALL_PROVEN, '10 m': 'limited' })
    expect((await reasonsOn('2026-07-01', 'K-04')).join()).toMatch(
      /10 m: 20 W at most, XFM-07 reached 85 °C after 8\.2 min/,
    )
  })

  it.each(['K-05', 'K-08'])(
    'has %s not proven on 10 m because of its sibling, while other bands stand',
    async (designation) => {
      const bands = await bandsOn('2026-07-01', designation)
      expect(bands).toEqual({ ...ALL_PROVEN, '10 m': 'not-proven' })
      expect((await reasonsOn('2026-07-01', designation)).join()).toMatch(
        /10 m.*XFM-07 of the same batch failed/,
      )
    },
  )

  it('has both bands of K-18, whose transformer is recalled on one that it does not promise', async () => {
    expect(await bandsOn('2026-07-01', 'K-18')).toEqual({ '40 m': 'proven', '20 m': 'proven' })
    const recalled = await demo.rows<{ designation: string }>(
      `SELECT i.designation FROM raised_check r JOIN item i ON i.id = r.item_id WHERE r.cause = 'recall' ORDER BY 1`,
    )
    expect(recalled.map((row) => row.designation)).toEqual(['XFM-08', 'XFM-09', 'XFM-10', 'XFM-11'])
  })

  it('does not know yet that K-11 was raided', async () => {
    const row = (await boardOf('2026-07-01')).rows.find(({ designation }) => designation === 'K-11')
    expect(row?.verdict).toBe('proven')
  })
})

describe('the night of 13 June 2026', () => {
  it('knew of the hot transformer only when the phone was back on the network', async () => {
    const id = await demo.idOf('K-04')
    const at = async (instant: string) =>
      ((await ines.get(`/api/v1/kits/${id}/readiness?asOf=${instant}`)).body as KitReadiness).period.reasons
    const before = (await at('2026-06-14T06:39:00Z')).map(({ text }) => text).join()
    expect(before).not.toContain('20 W at most')
    const after = (await at('2026-06-14T06:44:00Z')).map(({ text }) => text).join()
    expect(after).toContain('20 W at most')
  })
})
