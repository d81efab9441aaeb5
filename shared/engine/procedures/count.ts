/**
 * A kit counted against its load plan: every position, the seal, and what is in the kit that belongs elsewhere. The
 * count fails when a vital position is short; a supporting part that is missing is a finding of its own and lets the
 * count stand. Source: common practice, no source.
 */
import { failure, type Outcome, type Warning } from '../outcome.ts'
import type { Position, TestFinding } from '../readiness/types.ts'
import { findingOf, type Judgement } from './judgement.ts'

export interface CountInputs {
  readonly positions: readonly { readonly positionId: string; readonly found: number }[]
  readonly extraItemIds: readonly string[]
  readonly sealFound: string | null
  readonly sealApplied: string | null
}

interface Plan {
  readonly positions: readonly Position[]
  /** The number of the seal on record. */
  readonly sealNumber: string | null
}

/** `E_MISSING` when a position of the load plan was not looked at, `E_RANGE` for one that is not in it. */
export function judgeCount(inputs: CountInputs, plan: Plan): Outcome<Judgement> {
  const found = new Map(inputs.positions.map(({ positionId, found: n }) => [positionId, n]))
  const skipped = plan.positions.find(({ id }) => !found.has(id))
  if (skipped)
    return failure('E_MISSING', `Say what is in the position "${skipped.name}".`, { field: 'positions' })
  const known = new Set(plan.positions.map(({ id }) => id))
  if (inputs.positions.some(({ positionId }) => !known.has(positionId)))
    return failure('E_RANGE', "A position counted is not in this kit's load plan.", { field: 'positions' })
  const findings = plan.positions.map((position) => positionFinding(position, found.get(position.id) ?? 0))
  const isShort = plan.positions.some(({ vital, quantity, id }) => vital && (found.get(id) ?? 0) < quantity)
  const results = {
    counted: findings.length,
    short: findings.filter(({ finding }) => finding === 'fail').length,
    extra: inputs.extraItemIds.length,
    sealMatched: inputs.sealFound === plan.sealNumber,
  }
  return { results, findings, finding: isShort ? 'fail' : 'pass', warnings: sealWarnings(inputs, plan) }
}

function positionFinding({ id, name, quantity }: Position, found: number): TestFinding {
  const finding = found < quantity ? 'fail' : 'pass'
  const short = found === 0 ? `${name} missing` : `${name}: ${found} of ${quantity}`
  return findingOf({
    positionId: id,
    measure: 'present',
    value: found,
    finding,
    limit: `${quantity} of ${name}`,
    text: finding === 'pass' ? `${name} present` : short,
  })
}

function sealWarnings({ sealFound }: CountInputs, { sealNumber }: Plan): Warning[] {
  if (sealFound === sealNumber) return []
  const was = sealFound === null ? 'no whole seal was on the lid' : `seal ${sealFound} was on the lid`
  const record = sealNumber === null ? 'the record has none' : `the record has ${sealNumber}`
  return [{ code: 'W_SEAL', message: `${was}; ${record}.` }]
}
