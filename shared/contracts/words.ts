import { z } from 'zod'
import {
  AVAILABILITIES,
  BANDS,
  CATEGORIES,
  CONDITIONS,
  FINDINGS,
  MODES,
  PROCEDURES,
  VERDICTS,
  type Category,
} from '#shared/engine/vocabulary.ts'

/** The engine's closed lists of words as schemas. */

export const category = z.enum(Object.keys(CATEGORIES) as [Category, ...Category[]])
export const procedure = z.enum(PROCEDURES)
export const band = z.enum(BANDS)
export const mode = z.enum(MODES)
export const verdict = z.enum(VERDICTS)
export const availability = z.enum(AVAILABILITIES)
export const condition = z.enum(CONDITIONS)
export const findingWord = z.enum(FINDINGS)

/** An instant as the service answers it: ISO 8601 in UTC. */
export const answeredAt = z.string()

/** A query parameter that takes several words, separated by commas. */
export const listOf = <T extends z.ZodType<unknown, string>>(word: T) =>
  z
    .string()
    .max(400)
    .transform((value) => value.split(',').filter((part) => part !== ''))
    .pipe(z.array(word).max(30))

/** `now` follows the clock; the past is what was stored then; the future is what holds if nobody does anything. */
export const computedFor = z.enum(['now', 'past', 'future'])
