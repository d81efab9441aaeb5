import { groupBy } from '#shared/engine/group-by.ts'
import { currentsOf } from '#shared/engine/procedures/radio-currents.ts'
import type { Evidence, KitState } from '#shared/engine/readiness/types.ts'
import type { GroupTx } from '../group-transaction.ts'
import { itemFacts } from './item-facts.ts'
import * as statements from './kit-state-statements.ts'
import { policiesOf } from './policies.ts'

/** A kit's state with what its stored periods and its board row say besides. */
export interface LoadedKit {
  readonly state: KitState
  readonly station: boolean
  readonly placeId: string | null
  readonly retired: boolean
  readonly face: string
}

/**
 * Everything that the timelines of these kits depend on, in one round trip. The statements are sent together and the
 * server runs them in order, so a lock sent just before holds for all of them.
 */
export async function loadKitStates(
  tx: GroupTx,
  kitIds: readonly string[],
  readPolicies = policiesOf,
): Promise<LoadedKit[]> {
  const ids = [[...kitIds]]
  const [kits, positions, items, evidence, instruments, raised, decisions, policies, zone] =
    await Promise.all([
      tx.sql<statements.KitRow>(statements.KITS, ids),
      tx.sql<statements.PositionRow>(statements.POSITIONS, ids),
      tx.sql<statements.ItemRow>(statements.ITEMS, ids),
      tx.sql<statements.EvidenceRow>(statements.EVIDENCE, ids),
      tx.sql<statements.InstrumentRow>(statements.INSTRUMENTS, ids),
      tx.sql<statements.RaisedCheckRow>(statements.RAISED_CHECKS, ids),
      tx.sql<statements.DecisionRow>(statements.DECISIONS, ids),
      readPolicies(tx),
      tx.zone(),
    ])
  const byKind = groupBy(positions, (row) => row.kit_kind_id)
  const byKit = {
    items: groupBy(items, (row) => row.kit_id),
    evidence: groupBy(evidence, (row) => row.for_kit),
    instruments: groupBy(instruments, (row) => row.for_kit),
    raised: groupBy(raised, (row) => row.for_kit),
    decisions: groupBy(decisions, (row) => row.kit_id),
  }
  return kits.map((kit) => ({
    station: kit.station,
    placeId: kit.place_id,
    retired: kit.retired,
    face: kit.face,
    state: {
      kit: {
        id: kit.id,
        designation: kit.designation,
        availability: kit.availability,
        availabilityReason: kit.availability_reason,
        sealMatches: kit.seal_matches,
      },
      promise: kit.promise,
      positions: byKind.get(kit.kit_kind_id) ?? [],
      items: (byKit.items.get(kit.id) ?? []).map(itemOf),
      evidence: (byKit.evidence.get(kit.id) ?? []).map(evidenceOf),
      instruments: byKit.instruments.get(kit.id) ?? [],
      raisedChecks: (byKit.raised.get(kit.id) ?? []).map(raisedCheckOf),
      decisions: (byKit.decisions.get(kit.id) ?? []).map(decisionOf),
      policies,
      zone,
    },
  }))
}

export function itemOf(row: statements.ItemRow): KitState['items'][number] {
  return {
    id: row.id,
    designation: row.designation,
    category: row.category,
    positionId: row.position_id,
    condition: row.condition,
    conditionReason: row.condition_reason,
    facts: itemFacts(row.details, row.acquired_on),
  }
}

export function evidenceOf(row: statements.EvidenceRow): Evidence {
  return {
    id: row.id,
    procedure: row.procedure,
    subjectId: row.subject_id,
    performedAt: row.performed_at.getTime(),
    performedOn: row.performed_on,
    recordedAt: row.recorded_at.getTime(),
    instrumentId: row.instrument_id,
    finding: row.finding,
    findings: row.findings,
    ...(row.radio_inputs && { currents: currentsOf(row.radio_inputs) }),
  }
}

export function raisedCheckOf(row: statements.RaisedCheckRow): KitState['raisedChecks'][number] {
  return {
    id: row.id,
    subjectId: row.subject_id,
    procedure: row.procedure,
    band: row.band,
    reason: row.reason,
    doubtsEarlier: row.doubts_earlier,
    raisedAt: row.raised_at.getTime(),
    dueOn: row.due_on,
  }
}

function decisionOf(row: statements.DecisionRow): KitState['decisions'][number] {
  return {
    id: row.id,
    kind: row.kind,
    toVerdict: row.to_verdict,
    reason: row.reason,
    by: row.by,
    from: row.from_at.getTime(),
    until: row.until_at?.getTime() ?? null,
  }
}
