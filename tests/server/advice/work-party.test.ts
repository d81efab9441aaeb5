import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { planWorkParty, type WorkPartyPlan } from '#shared/contracts/work-party.ts'
import { LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'
import type { TestMember } from '../../support/test-app.ts'

/** A work party of the demo group at D0, planned from its fix lists. */

let demo: DemoApp
let tobin: TestMember

beforeAll(async () => {
  demo = await startDemoApp()
  tobin = await demo.as('tobin')
}, LOADING_MS)
afterAll(() => demo.close())

async function plan(body: object): Promise<WorkPartyPlan> {
  const answer = await tobin.post('/api/v1/work-party', body)
  expect(answer.status, JSON.stringify(answer.body)).toBe(200)
  return planWorkParty.response.parse(answer.body)
}

const tasksOf = ({ benches }: WorkPartyPlan) => benches.flatMap(({ tasks }) => tasks)
const kitsOf = (done: WorkPartyPlan['done']) =>
  done.flatMap(({ changes }) => changes.map(({ designation }) => designation))

describe('a work party', () => {
  it('begins with the swap that brings K-18 back, and counts the kit that it opened', async () => {
    const { benches, done } = await plan({ people: 1, minutes: 60 })
    expect(benches).toHaveLength(1)
    expect(benches[0]!.tasks.slice(0, 2).map(({ text }) => text)).toEqual([
      'Swap XFM-13 into K-18 for XFM-10',
      'Count K-18, as it was opened',
    ])
    expect(kitsOf(done)).toContain('K-18')
  })

  it('brings more with more people and hours, and never has an instrument on two benches at once', async () => {
    const small = await plan({ people: 1, minutes: 60 })
    const large = await plan({ people: 4, minutes: 240 })
    expect(large.done.length).toBeGreaterThan(small.done.length)
    const tasks = tasksOf(large)
    for (const one of tasks)
      for (const other of tasks)
        if (one !== other && one.instrument !== null && one.instrument === other.instrument)
          expect(one.to <= other.from || other.to <= one.from).toBe(true)
    for (const { to } of tasks) expect(to).toBeLessThanOrEqual(240)
  })

  it('changes when an instrument is missing, and says so', async () => {
    const all = await plan({ people: 4, minutes: 600 })
    const none = await plan({ people: 4, minutes: 600, instrumentIds: [] })
    expect(all.instruments.some(({ atHand }) => atHand)).toBe(true)
    expect(none.instruments.every(({ atHand }) => !atHand)).toBe(true)
    expect(tasksOf(none).every(({ instrument }) => instrument === null)).toBe(true)
    expect(none.left.some(({ why }) => why === 'instrument')).toBe(true)
    expect(none.done.length).toBeLessThan(all.done.length)
  })

  it('puts capacity runs on the testers through the nights, one each, and repeats the cautions', async () => {
    const { nights, nightCautions, instruments } = await plan({ people: 4, minutes: 600 })
    expect(nights.length).toBeGreaterThan(0)
    const slots = nights.map(({ night, tester }) => `${night} ${tester}`)
    expect(new Set(slots).size).toBe(slots.length)
    const testers = instruments.filter(
      ({ category, atHand }) => category === 'battery-tester' && atHand,
    ).length
    expect(Math.max(...nights.map(({ night }) => night))).toBe(Math.ceil(nights.length / testers))
    expect(nightCautions.join(' ')).toContain('short circuit')
  })

  it('lists what must be bought or fetched before, and what is said at the end', async () => {
    const { before, then } = await plan({ people: 4, minutes: 600 })
    expect(before.some((text) => /^(Buy|Fetch|Recall|Settle)/.test(text))).toBe(true)
    expect(then).toContain('Say that K-18 is available again')
  })

  it('leaves out kits that are elsewhere, and says so', async () => {
    const { done, left } = await plan({
      people: 4,
      minutes: 600,
      placeIds: ['01890a5d-ac96-774b-bcce-b302099a8057'],
    })
    expect(done).toEqual([])
    expect(left.length).toBeGreaterThan(0)
    expect(left.every(({ why }) => why === 'place')).toBe(true)
  })

  it('refuses a party of nobody', async () => {
    const answer = await tobin.post('/api/v1/work-party', { people: 0, minutes: 60 })
    expect(answer.status).toBe(422)
    expect(answer.body.errors[0].pointer).toBe('#/people')
  })
})
