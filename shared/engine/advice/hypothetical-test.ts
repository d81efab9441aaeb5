import { policyAt, ruleFor } from '../readiness/rules-in-force.ts'
import { zoneDays } from '../readiness/zone-days.ts'
import type { EpochMs, Evidence, KitState, Rule, TestFinding } from '../readiness/types.ts'
import type { Band, Category, Procedure } from '../vocabulary.ts'

interface Asked {
  readonly subjectId: string
  readonly procedure: Procedure
  readonly band: Band | null
}

/**
 * A test that passes now. Where a figure counts (capacity, efficiency, loss) it is the newest one that passed before,
 * else the limit itself: nothing better is promised than what was measured.
 */
export function passingTest(state: KitState, { subjectId, procedure, band }: Asked, at: EpochMs): Evidence {
  const item = state.items.find(({ id }) => id === subjectId)
  const instrument = state.instruments.find(({ id }) => id === subjectId)
  const category = item?.category ?? instrument?.category ?? 'kit'
  const rule = ruleNow(state, { category, facts: item?.facts ?? {}, procedure, band }, at)
  const before = state.evidence
    .filter((test) => test.subjectId === subjectId && sameKind(test.procedure, procedure))
    .sort((a, b) => b.performedAt - a.performedAt)
  const findings = bandsOf(before, procedure, band).map((on) => findingOn(on, procedure, rule, before))
  return evidence(state, { subjectId, procedure, findings, at, band })
}

/** A count that finds what the record has. */
export function hypotheticalCount(state: KitState, at: EpochMs): Evidence {
  const findings = state.positions.map((position) => {
    const found = state.items.filter(
      ({ positionId, condition }) => positionId === position.id && condition === 'serviceable',
    ).length
    const short = found < position.quantity
    return {
      ...PLAIN,
      finding: short ? ('fail' as const) : ('pass' as const),
      measure: 'present',
      value: found,
      positionId: position.id,
      text: short ? `${position.name} missing` : `${position.name} present`,
    }
  })
  const isShort = findings.some(
    ({ finding, positionId }) =>
      finding === 'fail' && state.positions.find(({ id }) => id === positionId)!.vital,
  )
  const test = evidence(state, { subjectId: state.kit.id, procedure: 'count', findings, at, band: null })
  return { ...test, finding: isShort ? 'fail' : 'pass' }
}

const PLAIN: TestFinding = {
  band: null,
  finding: 'pass',
  measure: 'passed',
  value: null,
  uncertainty: null,
  powerW: null,
  positionId: null,
  limit: '',
  text: 'passed',
}

const EFFICIENCY: readonly Procedure[] = ['pair-loss', 'open-short-load']
const sameKind = (a: Procedure, b: Procedure) => a === b || (EFFICIENCY.includes(a) && EFFICIENCY.includes(b))

const MEASURES: Readonly<Partial<Record<Procedure, string>>> = {
  'pair-loss': 'efficiency',
  'open-short-load': 'efficiency',
  'feedline-loss': 'lossDb',
  'battery-capacity': 'capacityFraction',
  'heat-test': 'peakC',
}

/** One finding for each band that has a figure of its own, and one for all the rest. */
function bandsOf(before: readonly Evidence[], procedure: Procedure, band: Band | null): (Band | null)[] {
  if (band !== null) return [band]
  if (!EFFICIENCY.includes(procedure) && procedure !== 'feedline-loss') return [null]
  const measured = new Set(before.flatMap(({ findings }) => findings.map((finding) => finding.band)))
  measured.delete(null)
  return measured.size > 0 ? [...measured] : [null]
}

function findingOn(
  band: Band | null,
  procedure: Procedure,
  rule: Rule | undefined,
  before: readonly Evidence[],
): TestFinding {
  const measure = MEASURES[procedure]
  const known = before.flatMap(({ findings }) =>
    findings.filter((one) => one.measure === measure && (band === null || one.band === band)),
  )
  const passed = known.find(({ finding, value }) => finding !== 'fail' && value !== null)
  const value = passed?.value ?? LIMITS[procedure]?.(rule) ?? null
  const powers = [rule?.limits.powerW, ...known.map(({ powerW }) => powerW)].filter(
    (watts): watts is number => typeof watts === 'number',
  )
  const powerW = procedure === 'heat-test' && powers.length > 0 ? Math.max(...powers) : null
  return { ...PLAIN, band, measure: measure ?? PLAIN.measure, value, powerW }
}

const numberOf = (value: unknown) => (typeof value === 'number' ? value : null)
const LIMITS: Readonly<Partial<Record<Procedure, (rule: Rule | undefined) => number | null>>> = {
  'pair-loss': (rule) => numberOf(rule?.limits.minEfficiency),
  'open-short-load': (rule) => numberOf(rule?.limits.minEfficiency),
  'battery-capacity': (rule) => numberOf(rule?.limits.minCapacityFraction),
}

function ruleNow(
  state: KitState,
  asked: {
    readonly category: Category | 'kit'
    readonly facts: object
    readonly procedure: Procedure
    readonly band: Band | null
  },
  at: EpochMs,
): Rule | undefined {
  const today = zoneDays(state.zone).dayOf(at)
  return ruleFor(policyAt(state, at), asked, asked.procedure, today, asked.band)
}

interface Made extends Asked {
  readonly findings: readonly TestFinding[]
  readonly at: EpochMs
}

function evidence(state: KitState, { subjectId, procedure, band, findings, at }: Made): Evidence {
  return {
    id: `what-if:${subjectId}:${procedure}:${band ?? 'all'}`,
    procedure,
    subjectId,
    performedAt: at,
    performedOn: zoneDays(state.zone).dayOf(at),
    recordedAt: at,
    instrumentId: null,
    finding: 'pass',
    findings,
  }
}
