import type { Procedure } from '../vocabulary.ts'
import { replaceAction } from './actions.ts'
import { reasonForStanding } from './check-reason.ts'
import type { Moment } from './moment.ts'
import { reasonAbout } from './reason.ts'
import { ruleFor, rulesFor } from './rules-in-force.ts'
import { failedCheckText } from './sentences.ts'
import type { FilledPosition } from './slots.ts'
import { standingOf, type Standing } from './standing.ts'
import type { Reason } from './period-types.ts'
import type { Evidence, ReadinessItem, Rule } from './types.ts'

/** Judged with the batteries and with the modes. */
const JUDGED_ELSEWHERE: ReadonlySet<Procedure> = new Set(['battery-capacity', 'boot-and-update'])
/** Judged band by band where the kit promises bands. */
const JUDGED_BY_BAND: ReadonlySet<Procedure> = new Set([
  'antenna-sweep',
  'feedline-loss',
  'heat-test',
  'open-short-load',
  'pair-loss',
  'radio-check',
])

export interface JudgedChecks {
  readonly reasons: readonly Reason[]
  /** Vital evidence that the verdict stands on. */
  readonly tests: readonly Evidence[]
}

/** The checks that speak for an item as a whole: inspection, calibration, and all others where no band is promised. */
export function judgeItems(moment: Moment, filled: readonly FilledPosition[]): JudgedChecks {
  const byBand = moment.state.promise.bands.length > 0
  const judged = filled.flatMap(({ position, working }) =>
    working.flatMap((item) =>
      proceduresAsked(moment, item)
        .filter((procedure) => !JUDGED_ELSEWHERE.has(procedure))
        .filter((procedure) => !byBand || !JUDGED_BY_BAND.has(procedure))
        .map((procedure) => judgeItem(moment, item, procedure, position.vital)),
    ),
  )
  return {
    reasons: judged.flatMap(({ reasons }) => reasons),
    tests: judged.flatMap(({ tests }) => tests),
  }
}

/** Each procedure that the policy asks of an item, once. */
export function proceduresAsked(
  moment: Moment,
  item: Pick<ReadinessItem, 'category' | 'facts'>,
): Procedure[] {
  return [...new Set(rulesFor(moment.policy, item, moment.today).map(({ procedure }) => procedure))]
}

function judgeItem(
  moment: Moment,
  item: ReadinessItem,
  procedure: Procedure,
  vitalPosition: boolean,
): JudgedChecks {
  const rule = ruleFor(moment.policy, item, procedure, moment.today)!
  const standing = standingOf(moment, { subjectId: item.id, procedures: [procedure], rule, band: null })
  const vital = vitalPosition && rule.vital
  const tests = vital && standing.test && standing.state === 'good' ? [standing.test] : []
  const reason = itemReason(item, rule, standing, vital)
  return { reasons: reason ? [reason] : [], tests }
}

function itemReason(item: ReadinessItem, rule: Rule, standing: Standing, vital: boolean): Reason | undefined {
  const { procedure } = rule
  if (standing.state !== 'failed') {
    const subject = { name: item.designation, itemId: item.id, positionId: item.positionId }
    const level = vital ? 'not-proven' : 'limit'
    return reasonForStanding(subject, { procedure, band: null, level }, standing)
  }
  return reasonAbout(item, {
    code: `${procedure}-failed`,
    level: vital ? 'not-fit' : 'limit',
    text: failedCheckText(item.designation, procedure, standing.finding!),
    testId: standing.test!.id,
    procedure,
    action: replaceAction(item.designation),
  })
}
