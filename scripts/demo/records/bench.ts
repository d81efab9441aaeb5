import type { PlainDate } from '#shared/engine/plain-date.ts'
import { later, onDay, type Local } from '../calendar.ts'
import type { DemoTest } from '../demo-test.ts'
import type { Step } from '../deeds.ts'
import type { PersonKey } from '../people.ts'

/** A test that a work party has to do; who and when is settled by `atTheBench`. */
export interface Job {
  readonly on: PlainDate
  /** Nobody begins earlier; 09:00 unless given. */
  readonly from?: string
  /** Who can do it. */
  readonly crew: readonly PersonKey[]
  /** Until it is written down. */
  readonly minutes: number
  readonly test: (performed: Local) => DemoTest
}

/** Each job goes to whoever of its crew is free first; a test is recorded when it is done. */
export function atTheBench(jobs: readonly Job[]): Step[] {
  const free = new Map<string, Local>()
  return jobs.map(({ on, from = '09:00', crew, minutes, test }) => {
    const beginning = onDay(on, from)
    const freeAt = (person: PersonKey) => latest(free.get(`${on} ${person}`) ?? beginning, beginning)
    const by = [...crew].sort((a, b) => compare(freeAt(a), freeAt(b)))[0]!
    const performed = freeAt(by)
    const at = later(performed, minutes)
    free.set(`${on} ${by}`, later(at, 1))
    return { at, by, deed: { do: 'test', test: test(performed) } }
  })
}

const compare = (a: string, b: string) => (a < b ? -1 : a > b ? 1 : 0)
const latest = (a: Local, b: Local) => (a > b ? a : b)
