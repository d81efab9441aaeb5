import { z } from 'zod'
import { isPlainDate } from '#shared/engine/plain-date.ts'

/** Control characters other than tab and newline, and halves of surrogate pairs. */
export const UNPRINTABLE =
  /[\u0000-\u0008\u000B-\u001F\u007F]|[\uD800-\uDBFF](?![\uDC00-\uDFFF])|(?<![\uD800-\uDBFF])[\uDC00-\uDFFF]/

/** Text as people type it: NFC, trimmed, without control characters; `max` counts UTF-16 units. */
export function text(max: number, min = 0) {
  return z
    .string()
    .refine((value) => !UNPRINTABLE.test(value), 'Contains characters that cannot be shown.')
    .transform((value) => value.normalize('NFC').trim())
    .pipe(
      z
        .string()
        .min(min, min === 1 ? 'Fill this in.' : undefined)
        .max(max),
    )
}

/** One line of text: newlines and tabs are refused too. */
export function line(max: number, min = 0) {
  return text(max, min).refine((value) => !/[\n\t]/.test(value), 'Use one line.')
}

/** A calendar day `YYYY-MM-DD` that exists, from 1970 to 2199. */
export const plainDate = z
  .string()
  .refine(
    (value) => isPlainDate(value) && value >= '1970-01-01' && value <= '2199-12-31',
    'Not a day: use YYYY-MM-DD.',
  )

/** An instant with its zone, ISO 8601, from 1970 to 2199. */
export const instant = z.iso
  .datetime({ offset: true })
  .refine((value) => value >= '1970' && value < '2200', 'Not an instant in a year from 1970 to 2199.')

/** A number that JSON can carry: finite, within the range, inclusive. */
export const amount = (min: number, max: number) => z.number().min(min).max(max)

/** Written in small letters, as PostgreSQL answers it, so that two ways of writing one id are one. */
export const id = z.uuid().toLowerCase()

/** An id made by the client for something it creates: UUIDv7, so that indexes stay in time order. */
export const newId = z.uuidv7().toLowerCase()

/** What every list answers: one page and the count of all. */
export const page = <T extends z.ZodType>(row: T) => z.object({ rows: z.array(row), total: z.int() })

/** What every registry list takes. Pages start at 1 and hold 25 rows unless asked, 200 at most. */
export const pageQuery = {
  page: z.coerce.number().int().min(1).max(100_000).default(1),
  size: z.coerce.number().int().min(1).max(200).default(25),
  search: line(80).default(''),
  descending: z.stringbool().default(false),
}
