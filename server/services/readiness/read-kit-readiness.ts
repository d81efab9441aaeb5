import type { ExposureRecord } from '#shared/contracts/kit-exposure.ts'
import type { KitReadiness } from '#shared/contracts/kit-readiness.ts'
import { checksAt } from '#shared/engine/readiness/checks.ts'
import { fixList } from '#shared/engine/readiness/fix-list.ts'
import { horizonOf } from '#shared/engine/readiness/horizon.ts'
import type { CheckState } from '#shared/engine/readiness/period-types.ts'
import { AppError } from '../../errors.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { raisedChecksOfKit } from '../evidence/raised-check-rows.ts'
import { summariesOf } from '../evidence/test-summaries.ts'
import { decisionsOfKit } from '../evidence/verdict-decisions.ts'
import { loadKitStates } from '../load-kit-states.ts'
import { periodsFrom, type StoredPeriod } from '../period-rows.ts'
import { exposureRecords } from './exposure-records.ts'
import { readKitFace } from './kit-face.ts'
import { kitPositions } from './kit-positions.ts'

interface Asked {
  readonly kitId: string
  /** ISO; absent: now. */
  readonly asOf: string | undefined
}

/** One kit as of an instant: its stored period and what comes after, and, unless it is past, its positions and checks. */
export async function readKitReadiness(tx: GroupTx, { kitId, asOf }: Asked): Promise<KitReadiness> {
  const at = asOf === undefined ? tx.now : new Date(asOf)
  const isPast = at < tx.now
  const [face, stored, raisedChecks, decisions] = await Promise.all([
    readKitFace(tx, kitId),
    periodsFrom(tx, [kitId], at),
    raisedChecksOfKit(tx, kitId),
    decisionsOfKit(tx, kitId, at),
  ])
  const periods = stored.get(kitId) ?? []
  const [current] = periods
  if (!current || current.from > at.getTime())
    throw new AppError('not-found', `Nothing was on record of ${face.designation} at that time.`)
  const now = isPast ? { checks: [], positions: [] } : await positionsAt(tx, kitId, at)
  const [exposure] = asOf === undefined ? await exposureRecords(tx, kitId, 1) : []
  const [step, next] = horizonOf(periods)
  return {
    ...face,
    ...whatWasSaid(current),
    asOf: at.toISOString(),
    computedFor: isPast ? 'past' : at > tx.now ? 'future' : 'now',
    knownSince: current.knownSince.toISOString(),
    period: answered(current),
    holdsUntil: isoOf(step?.until ?? null),
    nextVerdict: next?.verdict ?? null,
    positions: now.positions,
    kitChecks: now.checks.filter((check) => check.subjectId === kitId),
    fixes: fixList(current).map((fix) => ({ ...fix, reasons: [...fix.reasons] })),
    timeline: periods.map(answered),
    tests: await summariesOf(tx, testIds(current, now.checks)),
    raisedChecks,
    decisions,
    exposure: exposure ? noteOf(exposure) : null,
  }
}

const noteOf = ({ recordedOn, recordedBy, changed }: ExposureRecord) => ({ recordedOn, recordedBy, changed })

/** A period keeps the availability of its own time. */
function whatWasSaid({ availability, availabilityReason }: StoredPeriod) {
  return { availability, availabilityReason }
}

async function positionsAt(tx: GroupTx, kitId: string, at: Date) {
  const [kit] = await loadKitStates(tx, [kitId])
  if (!kit) return { checks: [], positions: [] }
  const checks = checksAt(kit.state, at.getTime())
  return { checks, positions: await kitPositions(tx, kit.state, checks) }
}

function testIds(period: StoredPeriod, checks: readonly CheckState[]): string[] {
  const ids = [...period.reasons, ...period.capability.bands, ...checks].map(({ testId }) => testId)
  return [...new Set(ids.filter((id) => id !== null))]
}

function answered(period: StoredPeriod): KitReadiness['period'] {
  const { verdict, availability, reasons, capability, oldestVitalOn } = period
  return {
    from: new Date(period.from).toISOString(),
    to: isoOf(period.to),
    verdict,
    availability,
    reasons: [...reasons],
    capability: {
      ...capability,
      bands: [...capability.bands],
      modes: [...capability.modes],
      hoursFactors: [...capability.hoursFactors],
    },
    oldestVitalOn,
  }
}

const isoOf = (at: number | null) => (at === null ? null : new Date(at).toISOString())
