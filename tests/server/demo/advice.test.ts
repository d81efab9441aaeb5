import { v7 as uuidv7 } from 'uuid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { readAdvice, type AdvicePlan } from '#shared/contracts/advice.ts'
import { askWhatIf, type WhatIfAnswer } from '#shared/contracts/what-if.ts'
import type { BoardAnswer } from '#shared/contracts/board.ts'
import type { ResponseOf } from '#shared/contracts/endpoint.ts'
import type { KitReadiness } from '#shared/contracts/kit-readiness.ts'
import { LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'
import { fullCount, recorded } from '../../support/evidence.ts'
import type { Item, Kit } from '../../support/registry.ts'
import type { TestMember } from '../../support/test-app.ts'

/** The end of section 7 and fact 13 of the demo scenario: what to do at D0, and that what-if says what then is so. */

let demo: DemoApp
let tobin: TestMember
let advice: ResponseOf<typeof readAdvice>

beforeAll(async () => {
  demo = await startDemoApp()
  tobin = await demo.as('tobin')
  advice = readAdvice.response.parse((await tobin.get('/api/v1/advice').expect(200)).body)
}, LOADING_MS)
afterAll(() => demo.close())

const textsOf = (plan: AdvicePlan) => plan.works.map(({ text }) => text)
const planFor = (designation: string) =>
  advice.plans.find(({ changes }) => changes.some((change) => change.designation === designation))!
const changeOf = (designation: string) =>
  planFor(designation).changes.find((change) => change.designation === designation)!
const stepsOf = (plan: AdvicePlan) => plan.works.flatMap(({ steps }) => steps)

async function ask(steps: object[]): Promise<WhatIfAnswer> {
  const answer = await tobin.post('/api/v1/what-if', { steps })
  expect(answer.status, JSON.stringify(answer.body)).toBe(200)
  return askWhatIf.response.parse(answer.body)
}

describe('the advice of the demo at D0', () => {
  it('is one answer for all who ask at once, however many', async () => {
    const answers = await Promise.all(Array.from({ length: 14 }, () => tobin.get('/api/v1/advice')))
    expect(answers.map(({ status }) => status)).toEqual(Array(14).fill(200))
    expect(answers.at(-1)!.body.plans).toEqual(answers[0]!.body.plans)
  })

  it('begins with the swap of XFM-13 into K-18: 15 minutes, from not fit to proven, and a count after it', () => {
    const [first] = advice.plans
    expect(textsOf(first!)[0]).toBe('Swap XFM-13 into K-18 for XFM-10')
    expect(first).toMatchObject({ minutes: 15, deployable: 1, proven: 1, countAfter: ['K-18'] })
    expect(first!.changes).toMatchObject([{ designation: 'K-18', before: 'not-fit', after: 'proven' }])
  })

  it('has CMP-17 booted and updated in an hour, which proves K-17', () => {
    expect(textsOf(planFor('K-17'))).toEqual(['Boot and update of CMP-17 (K-17)'])
    expect(planFor('K-17').minutes).toBe(60)
    expect(changeOf('K-17')).toMatchObject({ before: 'proven-with-limits', after: 'proven' })
  })

  it('buys a lead for K-03, whose own goes back to K-11, fetches ADP-11 and counts K-11', () => {
    const plan = planFor('K-11')
    expect(textsOf(plan)).toEqual(
      expect.arrayContaining([
        'Buy a stronger part for K-03 and put its DCL-11 into K-11',
        'Fetch ADP-11 for K-11',
        'Count K-11',
      ]),
    )
    expect(changeOf('K-11')).toMatchObject({ before: 'not-fit', after: 'proven' })
    expect(plan.changes.find(({ designation }) => designation === 'K-03')).toMatchObject({ after: 'proven' })
  })

  it('recalls K-12, which is late, and not K-10, which is not', () => {
    expect(planFor('K-12')).toMatchObject({ minutes: 10, returned: 1 })
    expect(textsOf(planFor('K-12'))[0]).toContain('Recall K-12')
    expect(planFor('K-10')).toBeUndefined()
  })

  it('gets at K-13 and K-14 with the key and a test night, which leaves them limited', () => {
    const plan = planFor('K-13')
    expect(textsOf(plan)[0]).toContain('the only key is abroad')
    for (const designation of ['K-13', 'K-14'])
      expect(plan.changes).toContainEqual(
        expect.objectContaining({ designation, before: 'not-proven', after: 'proven-with-limits' }),
      )
  })

  it('is ranked by kits that become deployable an hour, and uses no spare twice', () => {
    const rates = advice.plans.map(({ deployable, minutes }) => deployable / minutes)
    expect(rates).toEqual([...rates].sort((a, b) => b - a))
    const moved = advice.plans.flatMap(stepsOf).flatMap((step) => (step.kind === 'move' ? [step.itemId] : []))
    expect(new Set(moved).size).toBe(moved.length)
  })

  it('yields what it says when what-if is asked', async () => {
    for (const plan of advice.plans) {
      const { kits } = await ask(stepsOf(plan))
      const said = plan.changes.map(({ designation, after }) => `${designation} ${after}`).sort()
      expect(kits.map(({ designation, after }) => `${designation} ${after.verdict}`).sort()).toEqual(said)
    }
  })
})

describe('what-if on the demo', () => {
  it('counts the board before and after, and stores nothing', async () => {
    const read = async () => (await tobin.get('/api/v1/board?size=200')).body as BoardAnswer
    const board = await read()
    const answer = await ask(stepsOf(advice.plans[0]!))
    const total = (counts: BoardAnswer['counts'], verdict: string) =>
      counts.filter((cell) => cell.verdict === verdict).reduce((sum, { n }) => sum + n, 0)
    const all = ['proven', 'proven-with-limits', 'not-proven', 'not-fit'] as const
    expect(all.map((verdict) => total(answer.before, verdict))).toEqual([8, 8, 3, 5])
    expect(all.map((verdict) => total(answer.after, verdict))).toEqual([9, 8, 3, 4])
    expect((await read()).counts).toEqual(board.counts)
  })

  it('says which step does not fit', async () => {
    const kitId = await demo.idOf('K-18')
    const answer = await tobin.post('/api/v1/what-if', {
      steps: [
        { kind: 'count', kitId },
        { kind: 'take-out', itemId: uuidv7() },
      ],
    })
    expect(answer.status).toBe(422)
    expect(answer.body.errors[0]).toMatchObject({ pointer: '#/steps/1' })
  })

  it('is refused to an observer', async () => {
    expect((await (await demo.as('dana')).get('/api/v1/advice')).status).toBe(403)
  })

  it('says of a swap and a count what the record says once they are done', async () => {
    const read = async <T>(path: string) => (await tobin.get(`/api/v1/${path}`)).body as T
    const kitId = await demo.idOf('K-18')
    const cracked = await read<Item>(`items/${await demo.idOf('XFM-10')}`)
    const spare = await read<Item>(`items/${await demo.idOf('XFM-13')}`)
    const position = { kind: 'position', kitId, positionId: cracked.position!.id }
    const place = { kind: 'place', placeId: spare.place!.id }
    const move = (item: Item, from: object, to: object) =>
      tobin.post(`/api/v1/items/${item.id}/moves`, { moveId: uuidv7(), from, to, reason: '' }).expect(200)
    const readiness = () => read<KitReadiness>(`kits/${kitId}/readiness`)

    const swap = [
      { kind: 'take-out', itemId: cracked.id },
      { kind: 'move', itemId: spare.id, kitId, positionId: cracked.position!.id },
    ]
    const moved = (await ask(swap)).kits[0]!.after
    const counted = (await ask([...swap, { kind: 'count', kitId }])).kits[0]!.after
    await move(cracked, position, place)
    await move(spare, place, position)
    const then = await readiness()
    expect({ ...moved }).toEqual({
      verdict: then.period.verdict,
      availability: then.period.availability,
      then: then.nextVerdict,
      reasons: then.period.reasons,
      holdsUntil: then.holdsUntil,
    })
    await recorded(
      tobin,
      fullCount(await read<Kit>(`kits/${kitId}`), demo.app.clock.now().toISOString(), '0476'),
    )
    const last = await readiness()
    expect(counted).toMatchObject({ verdict: last.period.verdict, holdsUntil: last.holdsUntil })
  })
})
