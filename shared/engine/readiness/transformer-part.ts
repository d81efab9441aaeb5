import type { Band } from '../vocabulary.ts'
import { replaceAction, testAction } from './actions.ts'
import { bestPart, CLEAR, joinParts, standingPart, type BandPart } from './band-part.ts'
import { heatStanding, type HeatStanding } from './heat-standing.ts'
import type { Moment } from './moment.ts'
import { reasonAbout } from './reason.ts'
import { ruleFor } from './rules-in-force.ts'
import { cappedText, efficiencyText, heatUnprovenText, outText } from './sentences.ts'
import { standingOf, type Standing } from './standing.ts'
import type { Reason } from './period-types.ts'
import type { Evidence, ReadinessItem, Rule } from './types.ts'

const EFFICIENCY = ['pair-loss', 'open-short-load'] as const

/** The best of the kit's matching transformers on a band: loss and heat. None: nothing is lost there. */
export function transformerPart(
  moment: Moment,
  transformers: readonly ReadinessItem[],
  band: Band,
): BandPart {
  const parts = transformers.map((item) =>
    joinParts([efficiencyPart(moment, item, band), heatPart(moment, item, band)]),
  )
  return bestPart(parts) ?? CLEAR
}

interface Place {
  readonly item: ReadinessItem
  readonly band: Band
}

function efficiencyPart(moment: Moment, item: ReadinessItem, band: Band): BandPart {
  const rule = EFFICIENCY.map((procedure) =>
    ruleFor(moment.policy, item, procedure, moment.today, band),
  ).find((one) => one !== undefined)
  const asked = { subjectId: item.id, procedures: EFFICIENCY, rule, band, failureLapses: true }
  const standing = standingOf(moment, asked)
  const efficiency = efficiencyOf(standing)
  const lossDb = efficiency === null ? null : -10 * Math.log10(efficiency)
  if (standing.state !== 'failed')
    return { ...standingPart({ item, rule, procedure: 'pair-loss', band }, standing), lossDb }
  const text = efficiencyText(item.designation, band, efficiency)
  const reason = failure({ item, band }, standing, { code: 'efficiency-low', level: 'limit', text })
  return { ...limited(standing, reason), lossDb }
}

function efficiencyOf({ finding }: Standing): number | null {
  const value = finding?.measure === 'efficiency' ? finding.value : null
  return value !== null && value > 0 ? Math.min(1, value) : null
}

function heatPart(moment: Moment, item: ReadinessItem, band: Band): BandPart {
  const rule =
    ruleFor(moment.policy, item, 'heat-test', moment.today, band) ??
    ruleFor(moment.policy, item, 'heat-test', moment.today)
  const standing = heatStanding(moment, item.id, rule, band)
  const place = { item, band }
  switch (standing.state) {
    case 'not-asked':
      return CLEAR
    case 'good':
      return { ...CLEAR, tests: [standing.by.test] }
    case 'capped':
      return cappedPart(place, standing)
    case 'out': {
      const text = outText(band, item.designation, standing.failed.finding.text)
      const reason = failure(place, standing.failed, { code: 'heat-failed', level: 'not-fit', text })
      return { ...CLEAR, state: 'out', tests: [standing.failed.test], reasons: [reason] }
    }
    default:
      return unprovenHeat(place, rule, standing)
  }
}

function cappedPart(place: Place, { capW, by, failed }: HeatStanding & { state: 'capped' }): BandPart {
  const { designation } = place.item
  const text = cappedText(designation, place.band, capW, failed?.finding ?? null)
  const reason = failure(place, failed ?? by, { code: 'heat-capped', level: 'limit', text })
  const action = failed ? reason.action : testAction(designation, 'heat-test', place.band)
  return { ...limited(by, { ...reason, action }), capW }
}

function unprovenHeat(
  { item, band }: Place,
  rule: Rule | undefined,
  standing: HeatStanding & { state: 'never' | 'lapsed' | 'in-doubt' },
): BandPart {
  const vital = rule?.vital ?? true
  const reason = reasonAbout(item, {
    code: `heat-test-${standing.state}`,
    level: vital ? 'not-proven' : 'limit',
    text: heatUnprovenText(item.designation, band, standing),
    band,
    testId: 'by' in standing ? (standing.by?.test.id ?? null) : null,
    procedure: 'heat-test',
    action: testAction(item.designation, 'heat-test', band),
  })
  return { ...CLEAR, state: vital ? 'not-proven' : 'limited', reasons: [reason] }
}

interface Shown {
  readonly test: Evidence | null
}

function limited({ test }: Shown, reason: Reason): BandPart {
  return { ...CLEAR, state: 'limited', tests: test ? [test] : [], reasons: [reason] }
}

/** What a failed test says against a transformer on a band; another one would lift it. */
function failure(
  { item, band }: Place,
  { test }: Shown,
  said: Pick<Reason, 'code' | 'level' | 'text'>,
): Reason {
  const action = replaceAction(item.designation)
  const procedure = test?.procedure ?? null
  return reasonAbout(item, { ...said, band, testId: test?.id ?? null, procedure, action })
}
