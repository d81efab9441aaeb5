import { groupBy } from '#shared/engine/group-by.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import {
  EVIDENCE_COLUMNS,
  ITEM_COLUMNS,
  RAISED_COLUMNS,
  type EvidenceRow,
  type InstrumentRow,
  type ItemRow,
  type RaisedCheckRow,
} from '../kit-state-statements.ts'
import { evidenceOf, itemOf, raisedCheckOf } from '../load-kit-states.ts'
import { policiesOf } from '../policies.ts'

/** An item on a shelf: the same inputs as a kit's, with nothing promised and no load plan. */
export interface Spare {
  readonly state: KitState
  readonly placeId: string | null
}

const ITEMS: Statement = {
  name: 'spare-items',
  text: `SELECT ${ITEM_COLUMNS}, place_id FROM item
    WHERE group_id = $1 AND ($2::uuid IS NULL OR id = $2) AND kit_id IS NULL AND retired_at IS NULL
    ORDER BY designation, id`,
}
const SPARE = `SELECT id FROM item
  WHERE group_id = $1 AND ($2::uuid IS NULL OR id = $2) AND kit_id IS NULL AND retired_at IS NULL`
const EVIDENCE: Statement = {
  name: 'spare-evidence',
  text: `WITH own AS (SELECT t.id, t.item_id AS for_item, t.instrument_id FROM test t WHERE t.item_id IN (${SPARE})),
    calibrations AS (
      SELECT DISTINCT c.id, own.for_item FROM own JOIN test c ON c.item_id = own.instrument_id
        AND c.procedure IN ('calibration', 'session-check')
    )
    SELECT e.for_item AS for_kit, ${EVIDENCE_COLUMNS}
    FROM (SELECT id, for_item FROM own UNION SELECT id, for_item FROM calibrations) e JOIN test t ON t.id = e.id
    WHERE NOT EXISTS (SELECT FROM test s WHERE s.supersedes_id = t.id) ORDER BY t.performed_at, t.id`,
}
const INSTRUMENTS: Statement = {
  name: 'spare-instruments',
  text: `SELECT DISTINCT t.item_id AS for_kit, n.id, n.designation, n.category FROM test t
    JOIN item n ON n.id = t.instrument_id WHERE t.item_id IN (${SPARE}) ORDER BY n.designation, n.id`,
}
const RAISED: Statement = {
  name: 'spare-raised-checks',
  text: `SELECT r.item_id AS for_kit, ${RAISED_COLUMNS} FROM raised_check r
    WHERE r.item_id IN (${SPARE}) AND r.withdrawn_at IS NULL ORDER BY r.raised_at, r.id`,
}

/** Every item in use that sits in no kit, or the one named if it does. */
export async function loadSpares(tx: GroupTx, itemId: string | null = null): Promise<Spare[]> {
  const asked = [tx.groupId, itemId]
  const [items, evidence, instruments, raised, policies, zone] = await Promise.all([
    tx.sql<ItemRow & { place_id: string | null }>(ITEMS, asked),
    tx.sql<EvidenceRow>(EVIDENCE, asked),
    tx.sql<InstrumentRow>(INSTRUMENTS, asked),
    tx.sql<RaisedCheckRow>(RAISED, asked),
    policiesOf(tx),
    tx.zone(),
  ])
  const evidenceFor = groupBy(evidence, (row) => row.for_kit)
  const instrumentsFor = groupBy(instruments, (row) => row.for_kit)
  const raisedFor = groupBy(raised, (row) => row.for_kit)
  return items.map((row) => ({
    placeId: row.place_id,
    state: {
      kit: {
        id: row.id,
        designation: row.designation,
        availability: 'available',
        availabilityReason: '',
        sealMatches: true,
      },
      promise: { bands: [], modes: [], watts: null, hours: null },
      positions: [],
      items: [itemOf(row)],
      evidence: (evidenceFor.get(row.id) ?? []).map(evidenceOf),
      instruments: instrumentsFor.get(row.id) ?? [],
      raisedChecks: (raisedFor.get(row.id) ?? []).map(raisedCheckOf),
      decisions: [],
      policies,
      zone,
    },
  }))
}
