import type { Procedure } from '../vocabulary.ts'
import { reasonForStanding } from './check-reason.ts'
import type { Moment } from './moment.ts'
import { reasonOf } from './reason.ts'
import { rulesFor } from './rules-in-force.ts'
import { capital, PROCEDURE_WORDS, replaceAction } from './sentences.ts'
import type { FilledPosition } from './slots.ts'
import { standingOf, type Standing } from './standing.ts'
import type { Evidence, ReadinessItem, Reason, ReasonLevel, Rule } from './types.ts'

/** Judged elsewhere: band by band, with the batteries, or with the modes. */
const JUDGED_ELSEWHERE: ReadonlySet<Procedure> = new Set([
  'antenna-sweep',
  'pair-loss',
  'open-short-load',
  'heat-test',
  'battery-capacity',
  'boot-and-update',
])
/** Their failures take power from a band instead of stopping the kit. */
const FAILS_ON_BANDS: ReadonlySet<Procedure> = new Set(['feedline-loss', 'radio-check'])

export interface JudgedChecks {
  readonly reasons: readonly Reason[]
  readonly tests: readonly Evidence[]
}

/** The checks that speak for an item as a whole: power, line, inspection, calibration... */
export function judgeItems(moment: Moment, filled: readonly FilledPosition[]): JudgedChecks {
  const reasons: Reason[] = []
  const tests: Evidence[] = []
  for (const { position, working } of filled) {
    for (const item of working) {
      for (const rule of rulesFor(moment.policy, item, moment.today)) {
        if (JUDGED_ELSEWHERE.has(rule.procedure)) continue
        const standing = standingOf(moment, {
          subjectId: item.id,
          procedures: [rule.procedure],
          rule,
          band: null,
        })
        const vital = position.vital && rule.vital
        const reason = itemReason(item, rule, standing, vital)
        if (reason) reasons.push(reason)
        if (vital && standing.state === 'good' && standing.test) tests.push(standing.test)
      }
    }
  }
  return { reasons, tests }
}

function itemReason(item: ReadinessItem, rule: Rule, standing: Standing, vital: boolean): Reason | undefined {
  if (standing.state === 'failed') return failedReason(item, rule, standing, vital)
  const subject = { name: item.designation, itemId: item.id, positionId: item.positionId }
  const level: ReasonLevel = vital ? 'not-proven' : 'limit'
  return reasonForStanding(subject, { procedure: rule.procedure, band: null, level }, standing)
}

function failedReason(
  item: ReadinessItem,
  rule: Rule,
  { test, finding }: Standing,
  vital: boolean,
): Reason | undefined {
  const onBands =
    FAILS_ON_BANDS.has(rule.procedure) && finding?.value !== null && finding?.measure !== 'receives'
  if (onBands) return undefined
  return reasonOf({
    code: `${rule.procedure}-failed`,
    level: vital ? 'not-fit' : 'limit',
    text: `${item.designation}: ${capital(PROCEDURE_WORDS[rule.procedure])} failed, ${finding!.text}`,
    itemId: item.id,
    positionId: item.positionId,
    testId: test!.id,
    procedure: rule.procedure,
    action: replaceAction(item.designation),
  })
}
