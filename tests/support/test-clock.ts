import type { Clock } from '#server/clock.ts'

const MS = { seconds: 1000, minutes: 60_000, hours: 3_600_000, days: 86_400_000 } as const

/** A clock that stands still until the test moves it. */
export class TestClock implements Clock {
  #now: Date

  constructor(now: Date) {
    this.#now = now
  }

  now(): Date {
    return new Date(this.#now)
  }

  set(now: Date | string): void {
    this.#now = new Date(now)
  }

  /** Moves on, e.g. `advance(31, 'minutes')`. */
  advance(amount: number, unit: keyof typeof MS): void {
    this.#now = new Date(this.#now.getTime() + amount * MS[unit])
  }
}
