/**
 * Efficiency of a transformer from a two-port file of two like ones back to back, both directions compared. Heat and
 * plain insertion loss stand side by side; the heat is graded. Source: calculation sheet, section 3.
 */
import { isFailure, type Outcome } from '../outcome.ts'
import { pairLossSweep, type PairLoss } from '../pair-loss.ts'
import type { Band } from '../vocabulary.ts'
import { reflectionErrorOf } from './accuracy.ts'
import {
  efficiencyRows,
  fileEfficiencyFinding,
  storedEfficiency,
  type BandRow,
} from './efficiency-by-file.ts'
import type { FileKnowledge } from './file-knowledge.ts'
import { judgedBands } from './judged-bands.ts'
import { judgementOf, type Judgement } from './judgement.ts'
import type { PairLossLimits } from './pair-loss.ts'
import { fileOf } from './test-files.ts'

export interface PairFileInputs {
  readonly source: 'file'
  readonly file: string
  readonly bands: readonly Band[]
}

/** Failures of the file, of `pairLossSweep`, and of a band without a usable point. */
export function judgePairLossByFile(
  inputs: PairFileInputs,
  limits: PairLossLimits,
  known: FileKnowledge,
): Outcome<Judgement> {
  const file = fileOf(known.files, 'file', inputs.file)
  if (isFailure(file)) return file
  const bands = judgedBands(inputs.bands, known.region)
  if (isFailure(bands)) return bands
  const points = pairLossSweep(file, reflectionErrorOf(known.instrument))
  if (isFailure(points)) return { ...points, field: 'file' }
  const judged = efficiencyRows(points, bands)
  if (isFailure(judged)) return judged
  const findings = judged.rows.map((row) => fileEfficiencyFinding(row, limits))
  return judgementOf({ bands: judged.rows.map(storedPair) }, findings, judged.warnings)
}

function storedPair(row: BandRow<PairLoss>) {
  const { insertionLossDb, differenceDb, forward, reverse } = row.at
  return {
    ...storedEfficiency(row),
    insertionLossDb,
    differenceDb,
    forwardLossDb: forward.lossDb,
    reverseLossDb: reverse.lossDb,
  }
}
