import type { z } from 'zod'
import { numberText } from './quantity.ts'

type Issue = z.core.$ZodIssue

/** Writes a limit of a number in the unit in which the member types it. */
export type LimitWriter = (limit: number) => string

/** A fault of a draft in words that say what to type. The contract's own sentences pass through. */
export function issueText(issue: Issue, limitText: LimitWriter = (limit) => numberText(limit, 3)): string {
  if (issue.code === 'custom' || isOwnSentence(issue.message)) return issue.message
  switch (issue.code) {
    case 'invalid_type':
      if (issue.expected === 'int') return 'Use a whole number.'
      return issue.expected === 'number' ? 'Use a number, such as 12 or 0.5.' : 'Fill this in.'
    case 'too_small':
      return tooSmall(issue.origin, Number(issue.minimum), limitText)
    case 'too_big':
      return tooBig(issue.origin, Number(issue.maximum), limitText)
    case 'not_multiple_of':
      return `Use at most ${counted(decimalsOf(issue.divisor))}.`
    case 'invalid_value':
    case 'invalid_union':
      return 'Choose one of these.'
    case 'invalid_format':
      return issue.format === 'uuid' ? 'Choose one.' : 'This is not written as it should be.'
    default:
      return 'Look at this again.'
  }
}

/** zod's default sentences begin with one of these; what the contract says itself does not. */
function isOwnSentence(message: string): boolean {
  return !/^(?:Invalid|Too small|Too big|Unrecognized)\b/.test(message)
}

function tooSmall(origin: string, minimum: number, limitText: LimitWriter): string {
  if (origin === 'string' || origin === 'array') return 'Fill this in.'
  return `Use ${limitText(minimum)} or more.`
}

function tooBig(origin: string, maximum: number, limitText: LimitWriter): string {
  if (origin === 'string') return `Use ${maximum} characters or fewer.`
  if (origin === 'array') return `At most ${maximum}.`
  return `Use ${limitText(maximum)} or less.`
}

function decimalsOf(divisor: number): number {
  return Math.max(0, Math.round(-Math.log10(divisor)))
}

function counted(decimals: number): string {
  if (decimals === 0) return 'whole numbers'
  return decimals === 1 ? 'one decimal' : `${decimals} decimals`
}
