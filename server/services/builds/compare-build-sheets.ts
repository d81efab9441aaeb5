import type { z } from 'zod'
import type { compareBuildSheets as contract } from '#shared/contracts/build-figures.ts'
import type { RankedBuild } from '#shared/engine/build-comparison.ts'
import {
  compareRecords,
  UNUSABLE_ABOVE_DB,
  type RecordComparison,
} from '#shared/engine/builds/compare-records.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { BANDS, type Band } from '#shared/engine/vocabulary.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { loadBuildState } from './build-state.ts'
import { readSheets, type SheetRow } from './sheet-rows.ts'
import { recordOf } from './unit-answers.ts'

type Answer = z.output<typeof contract.response>

const NOTHING = { builds: [], bands: [], unusableAboveDb: UNUSABLE_ABOVE_DB } as const

/** Build sheets side by side. When nothing can be compared, the answer says why and leaves them all out. */
export async function compareBuildSheets(tx: GroupTx, ids: readonly string[]): Promise<Answer> {
  const [sheets, state] = await Promise.all([readSheets(tx, ids), loadBuildState(tx, ids)])
  const records = sheets.map((sheet) => ({ id: sheet.id, record: recordOf(state, sheet) }))
  const compared = compareRecords(records)
  if (isFailure(compared)) {
    const heat = { verdict: 'not-compared', run: null } as const
    return { ...NOTHING, builds: [], bands: [], heat, notes: [compared.message], leftOut: sheets.map(named) }
  }
  const ranked = new Set(compared.builds.map(({ name }) => name))
  return {
    builds: compared.builds.flatMap((build) => {
      const sheet = sheets.find(({ id }) => id === build.name)
      return sheet ? [buildOf(build, { sheet, compared })] : []
    }),
    bands: BANDS.filter((band) => compared.bands.includes(band)),
    unusableAboveDb: UNUSABLE_ABOVE_DB,
    heat: { verdict: compared.heat.verdict, run: compared.run },
    notes: compared.warnings.map(({ message }) => message),
    leftOut: sheets.filter(({ id }) => !ranked.has(id)).map(named),
  }
}

const named = ({ id, name }: SheetRow) => ({ id, name })

function buildOf(
  build: RankedBuild,
  { sheet, compared }: { sheet: SheetRow; compared: RecordComparison },
): Answer['builds'][number] {
  const { heat, bestPerBand } = compared
  const rise = heat.verdict === 'not-compared' ? null : heat.rises.find(({ name }) => name === build.name)
  const isBest = (band: string) =>
    bestPerBand.some((best) => best.band === band && best.builds.includes(build.name))
  return {
    sheet: named(sheet),
    rank: build.rank,
    units: build.units,
    bands: build.perBand.map(({ band, units, medianLossDb, lowestDb, highestDb, isUnusable }) => {
      return {
        band: band as Band,
        units,
        medianLossDb,
        lowestDb,
        highestDb,
        isUnusable,
        isBest: isBest(band),
      }
    }),
    meanLossDb: build.meanLossDb,
    meanWithoutWorstDb: build.meanWithoutWorstDb,
    worstBand: build.worstBand as Band,
    unusableBands: build.unusableBands.map((band) => band as Band),
    kPerW: rise?.kPerW ?? null,
    materialsCost: sheet.materials_cost,
    currency: sheet.currency ?? '',
  }
}
