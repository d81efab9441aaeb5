import type { Verdict } from '../vocabulary.ts'
import type { Reason } from './period-types.ts'

interface Saying {
  readonly verdict: Verdict
  readonly reasons: readonly Pick<Reason, 'text'>[]
}

/** What a change did to a kit: the verdict first, then what it added and what it lifted. */
export function effectSentences(designation: string, before: Saying | null, after: Saying): string[] {
  const known = new Set(before?.reasons.map(({ text }) => text))
  const now = new Set(after.reasons.map(({ text }) => text))
  return [
    verdictSentence(designation, before?.verdict ?? null, after.verdict),
    ...after.reasons.filter(({ text }) => !known.has(text)).map(({ text }) => `New: ${text}.`),
    ...(before?.reasons ?? []).filter(({ text }) => !now.has(text)).map(({ text }) => `Lifted: ${text}.`),
  ]
}

function verdictSentence(designation: string, before: Verdict | null, after: Verdict): string {
  if (before === after) return `${designation} stays ${verdictWords(after)}.`
  if (before === null) return `${designation} is ${verdictWords(after)}.`
  return `${designation} goes from ${verdictWords(before)} to ${verdictWords(after)}.`
}

export function verdictWords(verdict: Verdict): string {
  return verdict.replaceAll('-', ' ')
}
