import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  canBeDone,
  scheduleJobs,
  type Job,
  type Means,
  type Slot,
} from '#shared/engine/advice/party-schedule.ts'
import { RUNS, SLOW } from '../readiness/support/runs.ts'

const tasks = fc.array(
  fc.record({
    minutes: fc.constantFrom(1, 2, 3),
    needs: fc.constantFrom<Job['tasks'][number]['needs']>(
      [],
      ['analyzer'],
      ['wattmeter'],
      ['wattmeter', 'analyzer'],
    ),
  }),
  { minLength: 1, maxLength: 2 },
)
const jobs = fc.array(fc.record({ worth: fc.integer({ min: 1, max: 9 }), tasks }), {
  minLength: 1,
  maxLength: 4,
})
const means: fc.Arbitrary<Means> = fc.record({
  people: fc.constantFrom(1, 2),
  minutes: fc.integer({ min: 1, max: 6 }),
  instruments: fc.subarray([
    { id: 'A-1', category: 'analyzer' as const },
    { id: 'W-1', category: 'wattmeter' as const },
  ]),
})

const worthOf = (list: readonly Job[], slots: readonly Slot[]) =>
  list.reduce((sum, { worth }, place) => sum + (slots.some(({ job }) => job === place) ? worth : 0), 0)

/** Every task of every subset of the jobs at every minute, by anybody, with anything that would do. */
function bruteForce(list: readonly Job[], { people, minutes, instruments }: Means): number {
  let best = 0
  const every = list.flatMap((job, place) => job.tasks.map((task, index) => ({ ...task, place, index })))
  const look = (
    at: number,
    taken: readonly string[],
    ends: ReadonlyMap<number, number>,
    worth: number,
  ): void => {
    const task = every[at]
    if (!task) return void (best = Math.max(best, worth))
    if (task.index === 0) {
      const next = every.findIndex((one, place) => place > at && one.index === 0)
      look(next < 0 ? every.length : next, taken, ends, worth)
    }
    const tools =
      task.needs.length === 0
        ? ['']
        : instruments.filter(({ category }) => task.needs.includes(category)).map(({ id }) => id)
    const first = task.index === 0 ? 0 : ends.get(task.place)!
    for (let from = first; from + task.minutes <= minutes; from += 1)
      for (const tool of tools) {
        const span = Array.from({ length: task.minutes }, (_, minute) => from + minute)
        const busy = span.map((minute) => taken.filter((one) => one.startsWith(`${minute} `)).length)
        if (busy.some((n) => n >= people)) continue
        if (tool !== '' && span.some((minute) => taken.includes(`${minute} ${tool}`))) continue
        const last = list[task.place]!.tasks.length - 1 === task.index
        look(
          at + 1,
          [...taken, ...span.map((minute) => `${minute} ${tool}`)],
          new Map(ends).set(task.place, from + task.minutes),
          last ? worth + list[task.place]!.worth : worth,
        )
      }
  }
  look(0, [], new Map(), 0)
  return best
}

describe('a schedule of a work party', SLOW, () => {
  it('is worth as much as the best that brute force finds, on small cases', () => {
    fc.assert(
      fc.property(jobs, means, (list, party) => {
        expect(worthOf(list, scheduleJobs(list, party))).toBe(bruteForce(list, party))
      }),
      { ...RUNS, numRuns: RUNS.numRuns * 2 },
    )
  })

  it('has nobody and nothing in two places, every job whole and in its order, and all within the time', () => {
    fc.assert(
      fc.property(jobs, means, (list, party) => {
        const slots = scheduleJobs(list, party)
        const apart = (same: (slot: Slot) => unknown) => {
          for (const one of slots)
            for (const other of slots)
              if (one !== other && same(one) !== null && same(one) === same(other))
                expect(one.to <= other.from || other.to <= one.from).toBe(true)
        }
        apart(({ person }) => person)
        apart(({ instrumentId }) => instrumentId)
        apart(({ job }) => job)
        for (const { job, task, from, to, instrumentId } of slots) {
          const { minutes, needs } = list[job]!.tasks[task]!
          expect(to - from).toBe(minutes)
          expect(to).toBeLessThanOrEqual(party.minutes)
          const category = party.instruments.find(({ id }) => id === instrumentId)?.category ?? null
          expect(needs.length === 0 ? category === null : needs.includes(category!)).toBe(true)
          expect(slots.filter((slot) => slot.job === job)).toHaveLength(list[job]!.tasks.length)
          for (const next of slots.filter((slot) => slot.job === job && slot.task > task))
            expect(next.from).toBeGreaterThanOrEqual(to)
        }
      }),
      RUNS,
    )
  })

  it('takes forty jobs for ten people in no more time than a page may take', () => {
    const many: Job[] = Array.from({ length: 40 }, (_, place) => ({
      worth: (place % 7) + 1,
      tasks: [
        { minutes: 15 + (place % 4) * 15, needs: place % 3 === 0 ? ['analyzer'] : [] },
        { minutes: 30, needs: [] },
      ],
    }))
    const instruments = [{ id: 'A-1', category: 'analyzer' as const }]
    const slots = scheduleJobs(many, { people: 10, minutes: 180, instruments })
    expect(slots.length).toBeGreaterThan(40)
  })

  it('knows what no instrument at hand can measure', () => {
    const job: Job = { worth: 1, tasks: [{ minutes: 1, needs: ['thermometer'] }] }
    expect(canBeDone(job, { instruments: [] })).toBe(false)
    expect(scheduleJobs([job], { people: 1, minutes: 9, instruments: [] })).toEqual([])
  })
})
