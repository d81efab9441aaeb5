import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { line } from '#shared/contracts/fields.ts'
import { itemDetails } from '#shared/contracts/item-details.ts'
import { decimal } from '#shared/contracts/registry-fields.ts'
import { issueText } from '@/format/issue.ts'

function fault(schema: z.ZodType, value: unknown): string {
  const issue = schema.safeParse(value).error?.issues[0]
  return issue ? issueText(issue) : ''
}

describe('a fault of a draft in words', () => {
  it.each([
    ['nothing in a field that must be filled', line(24, 1), '', 'Fill this in.'],
    ['a text that is too long', line(3), 'abcd', 'Use 3 characters or fewer.'],
    ['no number', z.number(), 'abc', 'Use a number, such as 12 or 0.5.'],
    ['no number where none may stand', z.number().nullable(), 'abc', 'Use a number, such as 12 or 0.5.'],
    ['a fraction of a whole', z.int(), 1.5, 'Use a whole number.'],
    ['too small a number', z.number().min(0.1), 0, 'Use 0.1 or more.'],
    ['too large a number', z.number().max(70), 99, 'Use 70 or less.'],
    ['too many decimals', z.number().multipleOf(0.001), 0.00012, 'Use at most 3 decimals.'],
    ['nothing chosen of a list', z.uuid(), null, 'Fill this in.'],
    ['no word of a list', z.enum(['a', 'b']), 'c', 'Choose one of these.'],
    ['no category', itemDetails, { category: null }, 'Choose one of these.'],
    [
      'a sentence of the contract itself',
      decimal,
      'x',
      'Use a number of 0 or more with at most three decimals, such as 12 or 0.5.',
    ],
  ])('says what to do about %s', (_what, schema, value, sentence) => {
    expect(fault(schema, value)).toBe(sentence)
  })

  it('writes a limit in the unit in which it is typed', () => {
    const issue = z.number().max(70).safeParse(99).error!.issues[0]!
    expect(issueText(issue, (limit) => `${(limit * 9) / 5 + 32} °F`)).toBe('Use 158 °F or less.')
  })
})
