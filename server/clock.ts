/** The only source of "now". Tests and the demo data move it by hand. */
export interface Clock {
  now(): Date
}

export const systemClock: Clock = { now: () => new Date() }
