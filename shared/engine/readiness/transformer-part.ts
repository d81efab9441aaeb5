import type { Band } from '../vocabulary.ts'
import { CLEAR, joinParts, type BandPart } from './band-part.ts'
import { reasonForStanding } from './check-reason.ts'
import { heatStanding, type HeatStanding } from './heat-standing.ts'
import type { Moment } from './moment.ts'
import { reasonOf } from './reason.ts'
import { ruleFor } from './rules-in-force.ts'
import { amountText, doubtText, lapsedText, replaceAction, testAction } from './sentences.ts'
import { standingOf, type Candidate } from './standing.ts'
import type { ReadinessItem, Reason, Rule } from './types.ts'

const EFFICIENCY = ['pair-loss', 'open-short-load'] as const

/** Loss and heat of one matching transformer on a band. */
export function transformerPart(moment: Moment, item: ReadinessItem, band: Band): BandPart {
  return joinParts([efficiencyPart(moment, item, band), heatPart(moment, item, band)])
}

function efficiencyPart(moment: Moment, item: ReadinessItem, band: Band): BandPart {
  const rule =
    ruleFor(moment.policy, item, 'pair-loss', moment.today) ??
    ruleFor(moment.policy, item, 'open-short-load', moment.today)
  const standing = standingOf(moment, { subjectId: item.id, procedures: EFFICIENCY, rule, band })
  const tests = standing.test ? [standing.test] : []
  const efficiency = standing.finding?.measure === 'efficiency' ? standing.finding.value : null
  const lossDb = efficiency !== null && efficiency > 0 ? -10 * Math.log10(Math.min(1, efficiency)) : null
  if (standing.state === 'good') return { ...CLEAR, lossDb, tests }
  if (standing.state === 'failed') {
    const percent = efficiency === null ? 'too little' : `${Math.round(efficiency * 100)} %`
    const text = `${band}: ${item.designation} passes on ${percent} of the power`
    const reason = about(item, band, 'efficiency-low', text, {
      test: standing.test!,
      finding: standing.finding!,
    })
    return { ...CLEAR, state: 'limited', lossDb, tests, reasons: [reason] }
  }
  if (!rule) return { ...CLEAR, lossDb, tests }
  const subject = { name: item.designation, itemId: item.id, positionId: item.positionId }
  const reason = reasonForStanding(subject, { procedure: rule.procedure, band, level: 'limit' }, standing)
  return {
    ...CLEAR,
    state: rule.vital ? 'not-proven' : 'limited',
    lossDb,
    tests,
    reasons: reason ? [reason] : [],
  }
}

/** A band without a heat test of its own is judged by efficiency. */
function heatPart(moment: Moment, item: ReadinessItem, band: Band): BandPart {
  const rule = ruleFor(moment.policy, item, 'heat-test', moment.today)
  const standing = heatStanding(moment, item.id, rule, band)
  switch (standing.state) {
    case 'untested':
      return CLEAR
    case 'good':
      return { ...CLEAR, tests: [standing.by.test] }
    case 'capped':
      return cappedPart(item, band, standing)
    case 'out': {
      const text = `${band} out: ${item.designation} ${standing.failed.finding.text}`
      return { ...CLEAR, state: 'out', reasons: [about(item, band, 'heat-failed', text, standing.failed)] }
    }
    default:
      return unprovenHeat(item, band, rule, standing)
  }
}

function cappedPart(item: ReadinessItem, band: Band, standing: HeatStanding & { state: 'capped' }): BandPart {
  const { capW, by, failed } = standing
  const why = failed
    ? `${item.designation} ${failed.finding.text}`
    : `${item.designation} is heat tested to that power only`
  const text = `${band}: ${amountText(capW)} W at most, ${why}`
  const reason = failed
    ? about(item, band, 'heat-capped', text, failed)
    : {
        ...about(item, band, 'heat-capped', text, by),
        action: testAction(item.designation, 'heat-test', band),
      }
  return { ...CLEAR, state: 'limited', capW, tests: [by.test], reasons: [reason] }
}

function unprovenHeat(
  item: ReadinessItem,
  band: Band,
  rule: Rule | undefined,
  standing: HeatStanding & { state: 'lapsed' | 'in-doubt' },
): BandPart {
  const { test } = standing.by
  const text =
    standing.state === 'in-doubt'
      ? `Not proven on ${band}: ${doubtText(item.designation, 'heat-test', standing.doubt, null)}`
      : `Not proven on ${band}: ${lapsedText(item.designation, 'heat-test', test.performedOn, null)}`
  const action = testAction(item.designation, 'heat-test', band)
  const reason = { ...about(item, band, `heat-test-${standing.state}`, text, standing.by), action }
  return { ...CLEAR, state: rule?.vital === false ? 'limited' : 'not-proven', reasons: [reason] }
}

function about(item: ReadinessItem, band: Band, code: string, text: string, { test }: Candidate): Reason {
  return reasonOf({
    code,
    level: 'limit',
    text,
    band,
    itemId: item.id,
    positionId: item.positionId,
    testId: test.id,
    procedure: test.procedure,
    action: replaceAction(item.designation),
  })
}
