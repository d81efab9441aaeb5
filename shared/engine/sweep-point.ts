import type { Outcome } from './outcome.ts'

/** A figure at one frequency of a sweep. One bad point is a failure of its own and spoils no other. */
export interface SweepPoint<T> {
  readonly frequencyHz: number
  readonly result: Outcome<T>
}
