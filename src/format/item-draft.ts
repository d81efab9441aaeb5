import type { Accountability, Category, Condition } from '#shared/engine/vocabulary.ts'
import { ACCOUNTABILITY_WORDS } from '@/registry-words.ts'
import { CATEGORY_WORDS, CONDITION_WORDS } from '@/words.ts'
import { dayText } from './day.ts'
import { describeDetails } from './item-details.ts'

type QuantityWriter = (value: number, unit: string, digits?: number) => string

interface DescribedItem {
  readonly designation: string
  readonly details: { readonly category: Category | null } & Readonly<Record<string, unknown>>
  readonly maker: string
  readonly model: string
  readonly serial: string | null
  readonly accountability: Accountability
  readonly condition: Condition
  readonly conditionReason: string
  readonly acquiredOn: string | null
  readonly weightKg: number | string | null
  readonly notes: string
}

/** A draft field by field, as two versions are laid side by side. */
export function describeItem(item: DescribedItem, text: QuantityWriter): Record<string, string> {
  const { category } = item.details
  return {
    Designation: item.designation,
    Category: category ? CATEGORY_WORDS[category] : '',
    Maker: item.maker,
    Model: item.model,
    'Serial number': item.serial ?? '',
    Condition: [CONDITION_WORDS[item.condition], item.conditionReason].filter(Boolean).join(': '),
    ...describeDetails(item.details, text),
    'How strictly it must come back': ACCOUNTABILITY_WORDS[item.accountability],
    Acquired: item.acquiredOn ? dayText(item.acquiredOn) : '',
    Weight: typeof item.weightKg === 'number' ? text(item.weightKg, 'kg', 3) : (item.weightKg ?? ''),
    Notes: item.notes,
  }
}
