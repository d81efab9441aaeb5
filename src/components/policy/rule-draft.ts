import { limitsByProcedure } from '#shared/contracts/rules.ts'
import type { PolicyAnswer } from '#shared/contracts/policy.ts'
import type { Procedure } from '#shared/engine/vocabulary.ts'
import { uuidv7 } from '@/api/new-id.ts'

type Rule = PolicyAnswer['rules'][number]

/** A rule as it stands in the form: numbers as typed. */
export interface RuleDraft {
  id: string
  category: string
  procedure: Procedure
  applies: Record<string, unknown>
  intervalMonths: string
  warningDays: string
  vital: boolean
  limits: Record<string, string>
  reason: string
  source: string
}

const typed = (value: unknown) => (typeof value === 'number' ? String(value) : '')

/** Rules belong to one version, so a copy gets an id of its own. */
export function draftOfRule(rule: Rule): RuleDraft {
  const names = limitNames(rule.procedure)
  return {
    ...rule,
    id: uuidv7(),
    intervalMonths: typed(rule.intervalMonths),
    warningDays: typed(rule.warningDays),
    limits: Object.fromEntries(names.map((name) => [name, typed(rule.limits[name])])),
  }
}

export function newRule(category: string, procedure: Procedure): RuleDraft {
  const blank = { intervalMonths: 12, warningDays: 30, vital: true, limits: {}, applies: {} }
  return draftOfRule({
    id: '',
    category,
    procedure,
    reason: '',
    source: 'common practice, no source',
    ...blank,
  })
}

export function limitNames(procedure: Procedure): string[] {
  const schema = limitsByProcedure[procedure as keyof typeof limitsByProcedure]
  return schema ? Object.keys(schema.shape) : []
}

/** What is sent: text that is no number stays text, so that the service names the field. */
export function bodyOfRule(draft: RuleDraft): object {
  const limits = Object.entries(draft.limits).filter(([, text]) => text.trim() !== '')
  return {
    ...draft,
    intervalMonths: draft.intervalMonths.trim() === '' ? null : numberOrText(draft.intervalMonths),
    warningDays: numberOrText(draft.warningDays),
    limits: Object.fromEntries(limits.map(([name, text]) => [name, numberOrText(text)])),
  }
}

function numberOrText(text: string): number | string {
  const value = Number(text.trim().replace(',', '.'))
  return text.trim() !== '' && Number.isFinite(value) ? value : text
}
