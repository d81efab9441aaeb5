import type { Band, Procedure } from '../vocabulary.ts'
import { covers } from './band-part.ts'
import { checkRow, type CheckRow } from './check-row.ts'
import { dossierOf, momentOf, type Moment } from './moment.ts'
import { rulesFor } from './rules-in-force.ts'
import type { CheckState, EpochMs, KitState, ReadinessItem, Rule } from './types.ts'

/** Worst first: where the bands of one check differ, the worst stands for all. */
const WORST_FIRST = ['overdue', 'failed', 'in-doubt', 'never', 'due-soon', 'current'] as const

const BY_BAND: ReadonlySet<Procedure> = new Set([
  'antenna-sweep',
  'pair-loss',
  'open-short-load',
  'heat-test',
])
const EFFICIENCY: readonly Procedure[] = ['pair-loss', 'open-short-load']

/**
 * Every check that the policy asks of a kit and of the items in it at an instant, one a subject and procedure, in the
 * order of the load plan. `band` names the band at fault where only some are.
 */
export function checksAt(state: KitState, at: EpochMs): CheckState[] {
  const moment = momentOf(dossierOf(state), at)
  const vital = new Map(state.positions.map(({ id, vital: isVital }) => [id, isVital]))
  return [
    ...checksOfKit(moment),
    ...state.items.flatMap((item) =>
      checksOfItem(moment, item, {
        vital: vital.get(item.positionId ?? '') ?? false,
        bands: state.promise.bands,
      }),
    ),
  ]
}

function checksOfKit(moment: Moment): CheckState[] {
  const { id, designation } = moment.state.kit
  return rulesFor(moment.policy, { category: 'kit', facts: {} }, moment.today).flatMap((rule) => {
    const asked = { subjectId: id, name: designation, procedures: [rule.procedure], rule, band: null }
    const row = checkRow(moment, asked)
    return row ? [checkState(id, null, rule, rule.vital, row)] : []
  })
}

/** The checks of one item. `bands`: those its kit promises; empty for a spare, which is asked about all it covers. */
export function checksOfItem(
  moment: Moment,
  item: ReadinessItem,
  place: { readonly vital: boolean; readonly bands: readonly Band[] },
): CheckState[] {
  return rulesFor(moment.policy, item, moment.today).flatMap((rule) => {
    const procedures = EFFICIENCY.includes(rule.procedure) ? EFFICIENCY : [rule.procedure]
    const rows = bandsOf(rule, item, place.bands).flatMap(
      (band) =>
        checkRow(moment, { subjectId: item.id, name: item.designation, procedures, rule, band }) ?? [],
    )
    const vital = place.vital && rule.vital
    return [checkState(item.id, item.positionId, rule, vital, worst(rows) ?? neverTested(item, rule))]
  })
}

function bandsOf(rule: Rule, item: ReadinessItem, promised: readonly Band[]): readonly (Band | null)[] {
  if (!BY_BAND.has(rule.procedure)) return [null]
  const covered =
    promised.length > 0 ? promised.filter((band) => covers(item.facts.bands, band)) : item.facts.bands
  const named = rule.applies.bands as readonly Band[] | undefined
  const bands = (covered ?? []).filter((band) => covers(named, band))
  return bands.length > 0 ? bands : [null]
}

function worst(rows: readonly CheckRow[]): CheckRow | undefined {
  const sorted = [...rows].sort((a, b) => WORST_FIRST.indexOf(a.state) - WORST_FIRST.indexOf(b.state))
  const [first] = sorted
  if (!first || first.state === 'never')
    return first && { ...first, band: rows.length > 1 ? null : first.band }
  const shared = rows.every(({ state }) => state === first.state)
  const dueOn = shared ? earliest(rows) : first.dueOn
  return { ...first, band: shared && rows.length > 1 ? null : first.band, dueOn }
}

function earliest(rows: readonly CheckRow[]): CheckRow['dueOn'] {
  return rows.map(({ dueOn }) => dueOn).reduce((a, b) => (a === null || (b !== null && b < a) ? b : a), null)
}

/** No band of a heat test was ever run: the item is judged by its efficiency, and the list says so. */
function neverTested(item: ReadinessItem, rule: Rule): CheckRow {
  const because = `${item.designation}: no ${rule.procedure === 'heat-test' ? 'heat test' : 'result'} on record`
  return { state: 'never', band: null, finding: null, testId: null, testedOn: null, dueOn: null, because }
}

function checkState(
  subjectId: string,
  positionId: string | null,
  rule: Rule,
  vital: boolean,
  row: CheckRow,
): CheckState {
  return { subjectId, positionId, procedure: rule.procedure, ruleId: rule.id, vital, ...row }
}
