import type { BatchUnit } from '#shared/engine/builds/recall-units.ts'
import type { RecallCheck } from '#shared/engine/builds/recalls.ts'
import type { Rises } from '#shared/engine/builds/unit-figures.ts'
import { groupBy } from '#shared/engine/group-by.ts'
import { dossierOf, momentOf, type Moment } from '#shared/engine/readiness/moment.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { evidenceOf, raisedCheckOf } from '../load-kit-states.ts'
import { policiesOf } from '../policies.ts'
import * as statements from './build-statements.ts'

/** A unit made to a build sheet, as the pages of builds show it. */
export interface Unit extends BatchUnit {
  readonly sheetId: string
  readonly batch: { readonly id: string; readonly name: string } | null
  readonly kit: { readonly id: string; readonly designation: string } | null
  readonly place: string | null
}

/** All units of some build sheets with what their tests and recalls say, at the instant of the transaction. */
export interface BuildState {
  readonly moment: Moment
  readonly units: readonly Unit[]
  readonly rises: Rises
  /** Recalls of these units, taken back ones too. */
  readonly recalls: readonly (RecallCheck & { readonly raisedBy: string })[]
}

/** One round trip, whatever the number of sheets and units. */
export async function loadBuildState(tx: GroupTx, sheetIds: readonly string[]): Promise<BuildState> {
  const asked = [tx.groupId, [...sheetIds]]
  const [units, evidence, raised, policies, zone] = await Promise.all([
    tx.sql<statements.UnitRow>(statements.UNITS, asked),
    tx.sql<statements.TestRow>(statements.TESTS, asked),
    tx.sql<statements.CheckRow>(statements.CHECKS, asked),
    policiesOf(tx),
    tx.zone(),
  ])
  const instruments = groupBy(evidence, (row) => row.instrument_id ?? '')
  const state: KitState = {
    ...NO_KIT,
    evidence: evidence.map(evidenceOf),
    instruments: [...instruments.values()].flatMap(([row]) => instrumentOf(row)),
    raisedChecks: raised.filter((row) => row.withdrawn_at === null).map(raisedCheckOf),
    policies,
    zone,
  }
  return {
    moment: momentOf(dossierOf(state), tx.now.getTime()),
    units: units.map(unitOf),
    rises: new Map(evidence.flatMap(riseOf)),
    recalls: raised.filter((row) => row.cause === 'recall').map(recallOf),
  }
}

/** Units are judged by themselves here: no kit, no load plan, no promise. */
const NO_KIT = {
  kit: { id: '', designation: '', availability: 'available', availabilityReason: '', sealMatches: true },
  promise: { bands: [], modes: [], watts: null, hours: null },
  positions: [],
  items: [],
  decisions: [],
} as const

function instrumentOf(row: statements.TestRow | undefined): KitState['instruments'][number][] {
  if (!row?.instrument_id || !row.instrument_category) return []
  return [
    {
      id: row.instrument_id,
      designation: row.instrument_designation ?? '',
      category: row.instrument_category,
    },
  ]
}

function riseOf(row: statements.TestRow): [string, { riseK: number; minutes: number }][] {
  const { id, rise_k: riseK, keyed_minutes: minutes } = row
  return riseK === null || minutes === null ? [] : [[id, { riseK, minutes }]]
}

function recallOf(row: statements.CheckRow): BuildState['recalls'][number] {
  return {
    ...raisedCheckOf(row),
    withdrawnAt: row.withdrawn_at?.getTime() ?? null,
    raisedBy: row.raised_by ?? '',
  }
}

function unitOf(row: statements.UnitRow): Unit {
  return {
    id: row.id,
    designation: row.designation,
    category: row.category,
    condition: row.condition,
    isRetired: row.is_retired,
    ...(Array.isArray(row.bands) && { bands: row.bands as Band[] }),
    sheetId: row.sheet_id,
    batch: row.batch_id === null ? null : { id: row.batch_id, name: row.batch_name ?? '' },
    kit: row.kit_id === null ? null : { id: row.kit_id, designation: row.kit_designation ?? '' },
    place: row.place_name,
  }
}
