/**
 * Loss of a feedline from an analyzer's file: two ports, or one port with the far end open or shorted. The lossiest
 * point of a band counts. Source: calculation sheet, section 8; half the return loss: common practice, no source.
 */
import { efficiencyInBand } from '../efficiency-by-band.ts'
import { lineLossSweep } from '../feedline-measured.ts'
import { failure, isFailure, type Failure, type Outcome } from '../outcome.ts'
import type { TouchstoneFile } from '../touchstone/touchstone-file.ts'
import type { Band } from '../vocabulary.ts'
import { reflectionErrorOf } from './accuracy.ts'
import { judgeLine, type KnownLine, type LineReading } from './feedline-loss.ts'
import type { FileKnowledge } from './file-knowledge.ts'
import { bandWarnings, inBand, judgedBands, leftOutWarnings, megahertz } from './judged-bands.ts'
import type { Judgement } from './judgement.ts'
import { fileOf } from './test-files.ts'

export interface FeedlineFileInputs {
  readonly source: 'file'
  readonly file: string
  readonly bands: readonly Band[]
  readonly farEnd: 'open' | 'short' | 'second-port'
  readonly swrAtRadio?: readonly { readonly band: Band; readonly swr: number }[] | undefined
  readonly setsBaseline: boolean
}

export function judgeFeedlineByFile(
  inputs: FeedlineFileInputs,
  known: KnownLine & FileKnowledge,
): Outcome<Judgement> {
  const file = fileOf(known.files, 'file', inputs.file)
  if (isFailure(file)) return file
  const wrong = checkPorts(file, inputs.farEnd)
  if (wrong) return wrong
  const bands = judgedBands(inputs.bands, known.region)
  if (isFailure(bands)) return bands
  const points = lineLossSweep(file, reflectionErrorOf(known.instrument))
  if (isFailure(points)) return { ...points, field: 'file' }
  const readings: LineReading[] = []
  for (const band of bands) {
    const found = efficiencyInBand(points, band)
    if (isFailure(found)) return inBand(found, band.name)
    const { frequencyHz, lossDb, uLossDb } = found.worst
    const swr = inputs.swrAtRadio?.find((one) => one.band === band.name)?.swr
    readings.push({
      band: band.name,
      frequencyMHz: megahertz(frequencyHz),
      lossDb,
      uLossDb,
      ...(swr !== undefined && { swrAtRadio: swr }),
    })
  }
  const judgement = judgeLine(readings, inputs.setsBaseline, known)
  const said = [
    ...bands.flatMap((band) => bandWarnings(points, band)),
    ...leftOutWarnings('SWR at the radio', inputs.swrAtRadio ?? [], inputs.bands),
  ]
  return { ...judgement, warnings: [...judgement.warnings, ...said] }
}

function checkPorts({ ports }: TouchstoneFile, farEnd: FeedlineFileInputs['farEnd']): Failure | undefined {
  if ((ports === 2) === (farEnd === 'second-port')) return undefined
  const message =
    ports === 2
      ? 'This is a two-port file: the far end was on the second port.'
      : 'This is a one-port file: say whether the far end was open or shorted.'
  return failure('TS_PORTS', message, { field: 'farEnd' })
}
