/**
 * What every procedure answers, and how a measured value meets a limit. Marginal means that the limit lies inside the
 * expanded uncertainty (k = 2) of the measurement: nobody can say on which side the truth is (JCGM 106).
 */
import type { Warning } from '../outcome.ts'
import type { TestFinding } from '../readiness/types.ts'
import type { FindingWord } from '../vocabulary.ts'

export interface Judgement {
  readonly results: Readonly<Record<string, unknown>>
  readonly findings: readonly TestFinding[]
  /** The worst of the findings unless the procedure says otherwise. */
  readonly finding: FindingWord
  readonly warnings: readonly Warning[]
}

/** A finding's fields that differ from "about the whole thing, without a figure". */
export function findingOf(
  fields: Pick<TestFinding, 'finding' | 'measure' | 'limit' | 'text'> & Partial<TestFinding>,
): TestFinding {
  return { band: null, value: null, uncertainty: null, powerW: null, positionId: null, ...fields }
}

/**
 * `value` at or under `max` passes. With an expanded uncertainty the limit is marginal on both sides as far as that
 * reaches; exactly at its edge it is decided.
 */
export function judgeAtMost(value: number, max: number, uncertainty: number | null): FindingWord {
  if (uncertainty !== null && Math.abs(value - max) < uncertainty) return 'marginal'
  return value <= max ? 'pass' : 'fail'
}

/** `value` at or over `min` passes; otherwise as `judgeAtMost`. */
export function judgeAtLeast(value: number, min: number, uncertainty: number | null): FindingWord {
  return judgeAtMost(-value, -min, uncertainty)
}

export function worstOf(findings: readonly Pick<TestFinding, 'finding'>[]): FindingWord {
  if (findings.some(({ finding }) => finding === 'fail')) return 'fail'
  return findings.some(({ finding }) => finding === 'marginal') ? 'marginal' : 'pass'
}

export function judgementOf(
  results: Judgement['results'],
  findings: readonly TestFinding[],
  warnings: readonly Warning[] = [],
): Judgement {
  return { results, findings, finding: worstOf(findings), warnings }
}

/** A figure for a sentence: fixed digits without trailing zeros, and a minus that is no hyphen. */
export function figure(value: number, digits: number): string {
  return String(Number(value.toFixed(digits))).replace('-', '−')
}

/** 0.8125 as "81 %". */
export function percent(fraction: number, digits = 0): string {
  return `${figure(fraction * 100, digits)} %`
}

/** The same for a share that has to reach a limit: one that misses it is not rounded onto it, 0.796 of 0.8 is "79.6 %". */
export function shareText(fraction: number, least: number, digits = 0): string {
  const isRoundedOntoIt =
    fraction < least && Number((fraction * 100).toFixed(digits)) >= Number((least * 100).toFixed(6))
  if (!isRoundedOntoIt) return percent(fraction, digits)
  const scale = 10 ** (digits + 1)
  return percent(Math.floor(fraction * 100 * scale) / scale / 100, digits + 1)
}
