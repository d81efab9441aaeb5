import type { RecallProposal as ProposalAnswer } from '#shared/contracts/recall-shapes.ts'
import { buildRecord, type BuildRecord } from '#shared/engine/builds/build-record.ts'
import { recallProposals } from '#shared/engine/builds/recall-proposals.ts'
import { groupBy } from '#shared/engine/group-by.ts'
import type { BuiltCategory } from './sheet-rows.ts'
import type { BuildState, Unit } from './build-state.ts'

/** The record of one build sheet out of a state that may hold several. */
export function recordOf(
  { moment, units, rises }: BuildState,
  { id, category }: { id: string; category: BuiltCategory },
): BuildRecord {
  return buildRecord(moment, { units: units.filter(({ sheetId }) => sheetId === id), category, rises })
}

/** What failed and departing units propose, batch by batch. */
export function proposalsOf(state: BuildState, { departures }: BuildRecord): ProposalAnswer[] {
  const unitOf = new Map(state.units.map((unit) => [unit.id, unit]))
  const batches = groupBy(state.units, ({ batch }) => batch?.id ?? '')
  return [...batches.values()].flatMap((units) => {
    const batch = units[0]?.batch
    if (!batch) return []
    const asked = state.recalls
    return recallProposals(state.moment, { units, departures, asked }).map((proposal) => ({
      batch,
      procedure: proposal.procedure,
      band: proposal.band,
      causes: proposal.causes.map(({ unitId, kind, testId, text }) => {
        return { unit: unitNamed(unitOf, unitId), kind, testId, text }
      }),
      siblings: proposal.siblingIds.flatMap((id) => batchUnitsOf(unitOf, id)),
    }))
  })
}

type Units = ReadonlyMap<string, Unit>

function unitNamed(units: Units, id: string): { id: string; designation: string } {
  return { id, designation: units.get(id)?.designation ?? '' }
}

/** One, or none when the unit is not among them. */
export function batchUnitsOf(units: Units, id: string): ProposalAnswer['siblings'] {
  const unit = units.get(id)
  if (!unit) return []
  const { designation, condition, kit, place } = unit
  return [{ id, designation, condition, kit, place }]
}
