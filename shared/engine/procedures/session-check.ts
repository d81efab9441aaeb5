/**
 * An instrument against a reference part of the group's own ("golden" part), in the session in which it is used: it
 * reads what was agreed when the part was new and the instrument in date, or it has drifted. It shows that the
 * instrument still repeats itself at one value, and nothing about the rest of its range.
 * Source: in-service checking between calibrations, common practice, no source.
 */
import type { Category } from '../vocabulary.ts'
import { failure, type Outcome } from '../outcome.ts'
import { figure, findingOf, judgementOf, type Judgement } from './judgement.ts'

/** A part that its record marks as a reference. */
export interface ReferencePart {
  readonly id: string
  readonly designation: string
  /** The kind of instrument it is kept for; null: whichever reads it. */
  readonly for: Category | null
  /** What is read and how: "SWR at 7.1 MHz, short lead". */
  readonly reads: string
  readonly agreed: number
  /** Either way, in the unit of the reading. */
  readonly tolerance: number
  readonly unit: string
}

export interface SessionCheckInputs {
  readonly partId: string
  readonly reading: number
}

const DIGITS = 4

export function judgeSessionCheck(
  { partId, reading }: SessionCheckInputs,
  parts: readonly ReferencePart[],
): Outcome<Judgement> {
  const part = parts.find(({ id }) => id === partId)
  if (!part)
    return failure(
      'E_REFERENCE',
      'No reference part of this group: give it an agreed value on its page first.',
      {
        field: 'partId',
      },
    )
  const { designation, reads, agreed, tolerance } = part
  const unit = part.unit === '' ? '' : ` ${part.unit}`
  const off = reading - agreed
  // A quotient of decimals may miss the tolerance in its last binary digit.
  const passes = Math.abs(off) <= tolerance * (1 + 1e-9)
  const limit = `${figure(agreed, DIGITS)} ± ${figure(tolerance, DIGITS)}${unit}`
  const finding = findingOf({
    measure: 'reference',
    value: reading,
    finding: passes ? 'pass' : 'fail',
    limit,
    text: `reads ${figure(reading, DIGITS)}${unit} on ${designation}${reads === '' ? '' : ` (${reads})`}, agreed ${limit}`,
  })
  return judgementOf({ part, off }, [finding])
}
