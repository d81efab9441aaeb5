/** What the families of the registry share: retirement, yes/no/any filters, references and small response parts. */
import { z } from 'zod'
import { id, line } from './fields.ts'

/** Registry lists leave retired things out unless asked. */
export const retiredFilter = { retired: z.enum(['no', 'yes', 'any']).default('no') }

/** Things are retired with a reason, not deleted. */
export const retireBody = z.strictObject({ reason: line(500, 1) })

/** Bringing a retired thing back takes no words; an empty object. */
export const bringBackBody = z.strictObject({})

/** What every record of the registry carries beside its own fields. */
export const recordFields = {
  version: z.int(),
  createdAt: z.string(),
  retiredAt: z.string().nullable(),
  retiredReason: z.string().nullable(),
}

/** Something else of the group, as a record names it. */
export const named = z.object({ id, name: z.string() })

/** A kit or an item as another record names it. */
export const designated = z.object({ id, designation: z.string() })

/** A quantity with up to three decimals, kept exactly: a string such as "12" or "0.250". */
export const decimal = z
  .string()
  .regex(/^\d{1,9}(\.\d{1,3})?$/, 'Use a number of 0 or more with at most three decimals, such as 12 or 0.5.')
  .transform(canonicalDecimal)

/** A change of a quantity: a decimal with a sign, not zero. */
export const difference = z
  .string()
  .regex(/^[+-]?\d{1,9}(\.\d{1,3})?$/, 'Use a number with at most three decimals, such as -2 or 0.5.')
  .transform(canonicalDecimal)
  .refine((value) => value !== '0', 'Say how many came or went: not zero.')

/** One way to write a decimal: no plus, no leading or trailing zeros. "+02.50" is "2.5", "-0" is "0". */
export function canonicalDecimal(value: string): string {
  const [, sign = '', whole = '', fraction = ''] = /^([+-]?)(\d+)(?:\.(\d+))?$/.exec(value) ?? []
  const integer = whole.replace(/^0+(?=\d)/, '')
  const decimals = fraction.replace(/0+$/, '')
  const digits = decimals ? `${integer}.${decimals}` : integer
  return sign === '-' && digits !== '0' ? `-${digits}` : digits
}
