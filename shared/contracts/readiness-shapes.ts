import { z } from 'zod'
import { answeredAt, availability, band, category, findingWord, mode, procedure, verdict } from './words.ts'

/** How readiness looks in answers: the shapes of `shared/engine/readiness/types.ts` with instants as ISO text. */

export const action = z.object({
  kind: z.enum(['test', 'replace', 'find', 'repair', 'count', 'calibrate', 'decide', 'return', 'buy']),
  text: z.string(),
  /** Attended minutes; null where nobody can say. */
  minutes: z.number().nullable(),
})

export const reason = z.object({
  code: z.string(),
  level: z.enum(['not-fit', 'not-proven', 'limit', 'note']),
  text: z.string(),
  band: band.nullable(),
  positionId: z.string().nullable(),
  itemId: z.string().nullable(),
  testId: z.string().nullable(),
  procedure: procedure.nullable(),
  action: action.nullable(),
})

export const bandCapability = z.object({
  band,
  state: z.enum(['proven', 'limited', 'not-proven', 'out']),
  /** Radio output allowed on this band, W. */
  watts: z.number().nullable(),
  wattsAtAntenna: z.number().nullable(),
  /** Fraction of the radio's output that reaches the antenna, 0..1. */
  fraction: z.number().nullable(),
  lossDb: z.number().nullable(),
  limit: z.string(),
  testId: z.string().nullable(),
  testedOn: z.string().nullable(),
})

export const capability = z.object({
  bands: z.array(bandCapability),
  modes: z.array(mode),
  hours: z.number().nullable(),
  usableAh: z.number().nullable(),
  hoursFactors: z.array(z.string()),
  /** What the hours hold for, on one line. */
  hoursConditions: z.string().optional(),
})

export const period = z.object({
  from: answeredAt,
  /** Null: without end. */
  to: answeredAt.nullable(),
  verdict,
  availability,
  reasons: z.array(reason),
  capability,
  oldestVitalOn: z.string().nullable(),
})

/** A period of the horizon: what changes and why, without the capability. */
export const timelinePeriod = period.omit({ capability: true })

export const checkState = z.object({
  subjectId: z.string(),
  positionId: z.string().nullable(),
  procedure,
  band: band.nullable(),
  ruleId: z.string().nullable(),
  vital: z.boolean(),
  state: z.enum(['current', 'due-soon', 'overdue', 'never', 'failed', 'in-doubt']),
  finding: findingWord.nullable(),
  testId: z.string().nullable(),
  testedOn: z.string().nullable(),
  dueOn: z.string().nullable(),
  because: z.string(),
})

export const promise = z.object({
  bands: z.array(band),
  modes: z.array(mode),
  watts: z.number().nullable(),
  hours: z.number().nullable(),
  transmitPercent: z.number().nullable().optional(),
})

export { computedFor } from './words.ts'

/** A place, kind, member or instrument by id and name. */
export const named = z.object({ id: z.string(), name: z.string() })

export const itemNamed = z.object({ id: z.string(), designation: z.string(), category })
