import type { BuildFiguresAnswer } from '#shared/contracts/build-figures.ts'
import { acceptanceTests } from '#shared/engine/builds/acceptance.ts'
import type { UnitFigure } from '#shared/engine/builds/unit-figures.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { loadBuildState, type Unit } from './build-state.ts'
import { readSheets } from './sheet-rows.ts'
import { proposalsOf, recordOf } from './unit-answers.ts'

/** A build sheet with its units, their newest figures, and what these say together. */
export async function readBuildFigures(tx: GroupTx, buildSheetId: string): Promise<BuildFiguresAnswer> {
  const [[sheet], state] = await Promise.all([
    readSheets(tx, [buildSheetId]),
    loadBuildState(tx, [buildSheetId]),
  ])
  const { id, name, category, bands } = sheet!
  const record = recordOf(state, { id, category })
  const figuresOf = new Map(record.units.map(({ unitId, figures }) => [unitId, figures]))
  return {
    sheet: { id, name, category },
    units: state.units.map((unit) => unitOf(unit, figuresOf.get(unit.id) ?? [])),
    bands: [...record.bands],
    departures: record.departures.map((one) => {
      const { unitId, designation, band, measure, value, median, score, isWorse, testId, text } = one
      return { unit: { id: unitId, designation }, band, measure, value, median, score, isWorse, testId, text }
    }),
    proposals: proposalsOf(state, record),
    acceptance: acceptanceTests(state.moment, { category, bands: bands ?? [] }),
  }
}

function unitOf(
  { id, designation, condition, kit, place, batch, isRetired }: Unit,
  figures: readonly UnitFigure[],
): BuildFiguresAnswer['units'][number] {
  return { id, designation, condition, kit, place, batch, isRetired, figures: figures.map(figureOf) }
}

function figureOf({
  performedAt: _,
  ...figure
}: UnitFigure): BuildFiguresAnswer['units'][number]['figures'][number] {
  return figure
}
