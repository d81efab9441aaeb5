import type { Band, Procedure } from '../vocabulary.ts'
import { covers } from './band-part.ts'
import { checkRow, type CheckRow } from './check-row.ts'
import { WHOLE_KIT } from './count-standing.ts'
import { dossierOf, momentOf, type Moment } from './moment.ts'
import { bandsNamed, ruleFor, rulesFor } from './rules-in-force.ts'
import type { CheckState } from './period-types.ts'
import type { EpochMs, KitState, ReadinessItem } from './types.ts'
import { proceduresAsked } from './whole-checks.ts'

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
  const places = new Map(state.positions.map((position, place) => [position.id, { place, ...position }]))
  const placeOf = ({ positionId }: ReadinessItem) => places.get(positionId ?? '')?.place ?? places.size
  const inOrder = [...state.items].sort((a, b) => placeOf(a) - placeOf(b))
  return [
    ...checksOfKit(moment),
    ...inOrder.flatMap((item) => {
      const vital = places.get(item.positionId ?? '')?.vital ?? false
      return checksOfItem(moment, item, { vital, bands: state.promise.bands })
    }),
  ]
}

function checksOfKit(moment: Moment): CheckState[] {
  const { id, designation } = moment.state.kit
  const asked = new Set(rulesFor(moment.policy, WHOLE_KIT, moment.today).map(({ procedure }) => procedure))
  return [...asked].flatMap((procedure) => {
    const rule = ruleFor(moment.policy, WHOLE_KIT, procedure, moment.today)!
    const row = checkRow(moment, {
      subjectId: id,
      name: designation,
      procedures: [procedure],
      rule,
      band: null,
    })
    return row ? [{ subjectId: id, positionId: null, procedure, vital: rule.vital, ...row }] : []
  })
}

/** The checks of one item. `bands`: those its kit promises; empty for a spare, which is asked about all it covers. */
export function checksOfItem(
  moment: Moment,
  item: ReadinessItem,
  place: { readonly vital: boolean; readonly bands: readonly Band[] },
): CheckState[] {
  const asked = proceduresAsked(moment, item)
  // Efficiency has two ways of measuring; a policy that names both asks for it once.
  const once = asked.filter((procedure) => procedure !== 'open-short-load' || !asked.includes('pair-loss'))
  return once.flatMap((procedure) => {
    const rows = rowsOf(moment, item, procedure, place.bands)
    const row = worst(rows)
    if (!row) return []
    const rule = ruleFor(moment.policy, item, procedure, moment.today, row.band)
    const vital = place.vital && (rule?.vital ?? false)
    return [{ subjectId: item.id, positionId: item.positionId, procedure, vital, ...row }]
  })
}

function rowsOf(
  moment: Moment,
  item: ReadinessItem,
  procedure: Procedure,
  promised: readonly Band[],
): CheckRow[] {
  const procedures = EFFICIENCY.includes(procedure) ? EFFICIENCY : [procedure]
  const bands = BY_BAND.has(procedure) ? bandsOf(moment, item, procedure, promised) : [null]
  return bands.flatMap((band) => {
    const rule = ruleFor(moment.policy, item, procedure, moment.today, band)
    if (!rule) return []
    return checkRow(moment, { subjectId: item.id, name: item.designation, procedures, rule, band }) ?? []
  })
}

/** What the kit promises and the item covers; without either, the bands that the rules name, or the item as a whole. */
function bandsOf(
  moment: Moment,
  item: ReadinessItem,
  procedure: Procedure,
  promised: readonly Band[],
): readonly (Band | null)[] {
  if (promised.length > 0) return promised.filter((band) => covers(item.facts.bands, band))
  if (item.facts.bands && item.facts.bands.length > 0) return item.facts.bands
  const rules = rulesFor(moment.policy, item, moment.today).filter((rule) => rule.procedure === procedure)
  const named = [...new Set(rules.flatMap((rule) => bandsNamed(rule) ?? []))]
  return named.length > 0 ? named : [null]
}

function worst(rows: readonly CheckRow[]): CheckRow | undefined {
  const sorted = [...rows].sort((a, b) => WORST_FIRST.indexOf(a.state) - WORST_FIRST.indexOf(b.state))
  const [first] = sorted
  if (!first) return undefined
  const shared = rows.length > 1 && rows.every(({ state }) => state === first.state)
  return shared ? { ...first, band: null, dueOn: earliest(rows) } : first
}

function earliest(rows: readonly CheckRow[]): CheckRow['dueOn'] {
  return rows.map(({ dueOn }) => dueOn).reduce((a, b) => (a === null || (b !== null && b < a) ? b : a), null)
}
