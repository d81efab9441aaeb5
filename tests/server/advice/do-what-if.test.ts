import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { KitReadiness } from '#shared/contracts/kit-readiness.ts'
import { fullCount, givenStation, recorded, type Station } from '../../support/evidence.ts'
import { givenItem, givenPlace, into, moved, to, type Item, type Place } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'
import { asked, didWhatIf, doingOf } from '../../support/what-ifs.ts'

/** A what-if is done in one step: all that can be done of it, or nothing. */

let app: TestApp
let group: TestGroup
let keeper: TestMember
let coordinator: TestMember
let place: Place
let one: Station
let other: Station
let spare: Item

beforeAll(async () => {
  app = await startTestApp()
  group = await app.givenGroup('Doing')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  coordinator = await app.givenMember(group, { roles: ['net-coordinator'], name: 'Tobin Ashgrove' })
})
afterAll(() => app.close())

beforeEach(async () => {
  app.clock.advance(1, 'minutes')
  place = await givenPlace(keeper)
  const kit = { placeId: place.id, homePlaceId: place.id }
  one = await givenStation(keeper, { kit })
  other = await givenStation(keeper, { kit, kind: one.kind })
  spare = await moved(keeper, await givenItem(keeper, 'radio'), to(place))
  app.clock.advance(1, 'minutes')
})

const idOf = (station: Station) => station.items.radio!.id
const slot = (station: Station) => {
  const { kitId, positionId } = into(station.kit, 'radio')
  return { kitId, positionId }
}
const item = async (id: string) => (await keeper.get(`/api/v1/items/${id}`)).body as Item
const readiness = async (station: Station) =>
  (await keeper.get(`/api/v1/kits/${station.kit.id}/readiness`)).body as KitReadiness
const swapIn = () => [
  { kind: 'take-out', itemId: idOf(one) },
  { kind: 'move', itemId: spare.id, ...slot(one) },
]

describe('doing a what-if', () => {
  it('makes its moves at once, with their trace and their reason', async () => {
    const done = await didWhatIf(coordinator, swapIn())
    expect(done).toMatchObject({ doneBy: 'Tobin Ashgrove', reason: 'Storm on Thursday', notes: [] })
    expect(done.done).toEqual([
      `Take ${one.items.radio!.designation} out of ${one.kit.designation}`,
      `Put ${spare.designation} into ${one.kit.designation}`,
    ])
    expect(await item(spare.id)).toMatchObject({ kit: { id: one.kit.id }, place: null })
    expect(await item(idOf(one))).toMatchObject({ kit: null, place: { id: place.id } })
    const moves = (await keeper.get(`/api/v1/items/${spare.id}/moves`)).body
    expect(moves.rows[0]).toMatchObject({
      from: { place: { id: place.id } },
      to: { kit: { id: one.kit.id } },
      reason: 'Storm on Thursday',
      movedBy: { name: 'Tobin Ashgrove' },
    })
    const history = (await keeper.get(`/api/v1/history/kit/${one.kit.id}`)).body
    expect(history.rows.map(({ summary }: { summary: string }) => summary)).toContain(
      `moved ${spare.designation} from ${place.name} to ${one.kit.designation}: Storm on Thursday`,
    )
  })

  it('says afterwards what the question had said it would', async () => {
    const answer = await asked(coordinator, swapIn())
    const done = await didWhatIf(coordinator, swapIn())
    const [kit] = answer.kits
    expect(done.kits).toMatchObject([{ kitId: one.kit.id, after: kit!.atOnce.verdict }])
    expect((await readiness(one)).period.reasons).toEqual(kit!.atOnce.reasons)
  })

  it('swaps two parts of two kits, each with one movement', async () => {
    await didWhatIf(coordinator, [
      { kind: 'take-out', itemId: idOf(one) },
      { kind: 'move', itemId: idOf(other), ...slot(one) },
      { kind: 'move', itemId: idOf(one), ...slot(other) },
    ])
    expect(await item(idOf(one))).toMatchObject({ kit: { id: other.kit.id } })
    expect(await item(idOf(other))).toMatchObject({ kit: { id: one.kit.id } })
    const { rows } = (await keeper.get(`/api/v1/items/${idOf(one)}/moves`)).body
    expect(rows).toHaveLength(2)
  })

  it('buys nothing: the purchase stays a note, and the old part stays in until then', async () => {
    const steps = [
      { kind: 'buy', ...slot(one) },
      { kind: 'take-out', itemId: idOf(one) },
      { kind: 'move', itemId: spare.id, ...slot(other) },
    ]
    await expect(asked(coordinator, steps)).rejects.toThrow('is full')
    const done = await didWhatIf(coordinator, steps.slice(0, 2))
    expect(done.done).toEqual([])
    expect(done.notes.map(({ text }) => text)).toEqual([
      `Buy a new radio for ${one.kit.designation}`,
      `Take ${one.items.radio!.designation} out of ${one.kit.designation}`,
    ])
    expect(await item(idOf(one))).toMatchObject({ kit: { id: one.kit.id } })
    const history = (await keeper.get(`/api/v1/history/kit/${one.kit.id}`)).body
    expect(history.rows[0].summary).toContain('noted to do: ')
  })

  it('never records a test: it stays a note', async () => {
    const before = await readiness(one)
    const answer = await asked(coordinator, [{ kind: 'count', kitId: one.kit.id }])
    expect(answer.steps).toMatchObject([{ waits: expect.stringContaining('Only a test on record') }])
    await didWhatIf(coordinator, [{ kind: 'count', kitId: one.kit.id }])
    expect((await readiness(one)).period.reasons).toEqual(before.period.reasons)
  })

  it('accepts a risk for a skipped test by name, with its end, and leaves the verdict', async () => {
    const before = await readiness(one)
    const skip = {
      kind: 'skip',
      kitId: one.kit.id,
      subjectId: idOf(one),
      procedure: 'radio-check',
      band: null,
    }
    await didWhatIf(coordinator, [{ ...skip, accept: null }])
    expect((await readiness(one)).decisions).toEqual([])
    const accept = { reason: 'No time before Thursday', untilAt: '2026-07-01T12:00:00Z' }
    const answer = await asked(coordinator, [{ ...skip, accept }])
    await didWhatIf(coordinator, [{ ...skip, accept }])
    const after = await readiness(one)
    expect(after.period.verdict).toBe(before.period.verdict)
    expect(after.period.reasons).toEqual(answer.kits[0]!.atOnce.reasons)
    expect(after.decisions).toMatchObject([
      {
        kind: 'risk-accepted',
        decidedBy: 'Tobin Ashgrove',
        untilAt: '2026-07-01T12:00:00.000Z',
        reason: `radio check of ${one.items.radio!.designation} skipped: No time before Thursday`,
      },
    ])
  })

  it('calls a kit available again', async () => {
    const set = { availability: 'out-of-service', reason: 'Key abroad' }
    const { version } = (await keeper.get(`/api/v1/kits/${one.kit.id}`)).body as { version: number }
    await keeper
      .post(`/api/v1/kits/${one.kit.id}/availability`, set)
      .set('If-Match', `"${version}"`)
      .expect(200)
    await didWhatIf(coordinator, [{ kind: 'back', kitId: one.kit.id }])
    expect(await readiness(one)).toMatchObject({ availability: 'available', availabilityReason: '' })
  })

  it('is stored once when it is sent twice, and refused under the id of another', async () => {
    const { path, body } = await doingOf(coordinator, swapIn())
    const first = (await coordinator.put(path, body).expect(200)).body
    app.clock.advance(1, 'minutes')
    expect((await coordinator.put(path, body).expect(200)).body).toEqual(first)
    const changed = await coordinator.put(path, { ...body, reason: 'Another' }).expect(409)
    expect(changed.body.code).toBe('id-taken')
    expect((await keeper.get(`/api/v1/items/${spare.id}/moves`)).body.rows).toHaveLength(2)
  })

  it('does nothing at all when something of it changed since it was looked at', async () => {
    const { path, body } = await doingOf(coordinator, swapIn())
    await recorded(keeper, fullCount(one.kit, app.clock.now().toISOString()))
    const answer = await coordinator.put(path, body).expect(409)
    expect(answer.body).toMatchObject({
      code: 'state-conflict',
      detail: expect.stringContaining('Nothing was done'),
    })
    expect(await item(spare.id)).toMatchObject({ kit: null })
    expect(await item(idOf(one))).toMatchObject({ kit: { id: one.kit.id } })
  })

  it('leaves a trace of nothing when a part of it is refused', async () => {
    const nowhere = await givenStation(keeper, { kind: one.kind })
    const steps = [...swapIn(), { kind: 'take-out', itemId: idOf(nowhere) }]
    const { path, body } = await doingOf(coordinator, steps)
    const answer = await coordinator.put(path, body).expect(422)
    expect(answer.body.errors).toEqual([
      {
        pointer: '#/placeId',
        detail: `Say where ${nowhere.items.radio!.designation} is put: its kit has no place.`,
      },
    ])
    expect(await item(spare.id)).toMatchObject({ kit: null })
    await coordinator.put(path, { ...body, placeId: place.id }).expect(200)
    expect(await item(idOf(nowhere))).toMatchObject({ place: { id: place.id } })
  })

  it('does one of two that want the same part, and tells the other', async () => {
    const [mine, theirs] = [
      await doingOf(coordinator, swapIn()),
      await doingOf(keeper, [
        { kind: 'take-out', itemId: idOf(other) },
        { kind: 'move', itemId: spare.id, ...slot(other) },
      ]),
    ]
    const answers = await Promise.all([
      coordinator.put(mine.path, mine.body),
      keeper.put(theirs.path, theirs.body),
    ])
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409])
  })

  it('is listed, latest first, with what it left to do', async () => {
    await didWhatIf(coordinator, swapIn(), { reason: 'The first' })
    app.clock.advance(1, 'minutes')
    await didWhatIf(coordinator, [{ kind: 'count', kitId: one.kit.id }], { reason: 'The second' })
    const { rows } = (await keeper.get('/api/v1/what-ifs').expect(200)).body
    expect(rows.slice(0, 2)).toMatchObject([
      { reason: 'The second', done: [], notes: [{ text: `Count ${one.kit.designation}` }] },
      { reason: 'The first', notes: [] },
    ])
  })
})
