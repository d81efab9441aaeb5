/**
 * Efficiency of a transformer from three sweeps of its 50 ohm side, the secondary open, shorted and loaded. A standard
 * that cannot be right makes points impossible: a band of them is refused, and points elsewhere are a warning, since
 * the same fault may bend the bands that still look possible. Source: calculation sheet, section 4.
 */
import { failure, isFailure, type Outcome, type Warning } from '../outcome.ts'
import { recogniseTerminations } from '../recognise-terminations.ts'
import { threeTerminationSweep, type TerminationFiles } from '../three-termination-sweep.ts'
import type { SweepPoint } from '../sweep-point.ts'
import type { ThreeTermination } from '../three-termination.ts'
import type { Band } from '../vocabulary.ts'
import { reflectionErrorOf } from './accuracy.ts'
import {
  efficiencyRows,
  fileEfficiencyFinding,
  storedEfficiency,
  type BandRow,
} from './efficiency-by-file.ts'
import type { FileKnowledge } from './file-knowledge.ts'
import { judgedBands, megahertz, type JudgedBand } from './judged-bands.ts'
import { figure, judgementOf, type Judgement } from './judgement.ts'
import type { PairLossLimits } from './pair-loss.ts'
import { fileOf } from './test-files.ts'

export interface OpenShortLoadInputs {
  readonly open: string
  readonly short: string
  readonly load: string
  readonly loadOhm: number
  readonly openStrayPf: number
  readonly bands: readonly Band[]
}

export interface WindingFacts {
  readonly turnsPrimary?: number | undefined
  readonly turnsSecondary?: number | undefined
}

interface Known extends FileKnowledge {
  readonly transformer: WindingFacts
}

export function judgeOpenShortLoad(
  inputs: OpenShortLoadInputs,
  limits: PairLossLimits,
  known: Known,
): Outcome<Judgement> {
  const files = filesOf(inputs, known)
  if (isFailure(files)) return files
  const bands = judgedBands(inputs.bands, known.region)
  if (isFailure(bands)) return bands
  const { loadOhm, openStrayPf } = inputs
  const readingError = reflectionErrorOf(known.instrument)
  const sweep = threeTerminationSweep(files, { loadOhm, openStrayPf, readingError })
  if (isFailure(sweep)) return sweep
  const judged = efficiencyRows(sweep.points, bands)
  if (isFailure(judged)) return judged
  const findings = judged.rows.map((row) => fileEfficiencyFinding(row, limits))
  const warnings = [
    ...sweep.warnings,
    ...loadWarnings(loadOhm, known.transformer),
    ...standardWarnings(sweep.points, bands),
    ...judged.warnings,
  ]
  return judgementOf({ loadOhm, bands: judged.rows.map(storedSweep) }, findings, warnings)
}

function filesOf(inputs: OpenShortLoadInputs, { files }: FileKnowledge): Outcome<TerminationFiles> {
  const open = fileOf(files, 'open', inputs.open)
  if (isFailure(open)) return open
  const short = fileOf(files, 'short', inputs.short)
  if (isFailure(short)) return short
  const load = fileOf(files, 'load', inputs.load)
  if (isFailure(load)) return load
  return checkRoles({ open, short, load })
}

const ROLES = ['open', 'short', 'load'] as const

/** Open and short swapped is only a warning of the sweep; a load in another's place would give a wrong figure. */
function checkRoles(files: TerminationFiles): Outcome<TerminationFiles> {
  const told = recogniseTerminations(ROLES.map((role) => ({ fileName: '', file: files[role] })))
  if (isFailure(told)) {
    if (told.code !== 'E_SAME_TRACE') return told
    const message = 'Two of the three files hold the same trace: measure again, one termination a file.'
    return failure(told.code, message, { field: 'open' })
  }
  const isUnsure = told.warnings.some(({ code }) => code === 'W_UNSURE')
  const given = ROLES[told.assignment.load]
  if (given === 'load' || given === undefined || isUnsure) return files
  const message = `The files are swapped: by its trace the one given as ${given} is the load.`
  return failure('E_SWAPPED', message, { field: 'load' })
}

/** The load should be what the turns make of 50 ohm; further off than this it is another load. Our choice. */
const LOAD_WITHIN = 0.2

function loadWarnings(loadOhm: number, { turnsPrimary, turnsSecondary }: WindingFacts): Warning[] {
  if (!turnsPrimary || !turnsSecondary) return []
  const wantedOhm = 50 * (turnsSecondary / turnsPrimary) ** 2
  if (Math.abs(loadOhm / wantedOhm - 1) <= LOAD_WITHIN) return []
  const turns = `${figure(turnsPrimary, 1)}:${figure(turnsSecondary, 1)}`
  const message =
    `A load of ${figure(loadOhm, 0)} ohm is far from the ${figure(wantedOhm, 0)} ohm of ${turns} turns: ` +
    'the efficiency is the one into that load.'
  return [{ code: 'W_LOAD_OHM', message }]
}

function standardWarnings(
  points: readonly SweepPoint<ThreeTermination>[],
  bands: readonly JudgedBand[],
): Warning[] {
  const isJudged = (hz: number) => bands.some(({ lowHz, highHz }) => hz >= lowHz && hz <= highHz)
  const wrong = points.find(
    ({ frequencyHz, result }) =>
      isFailure(result) && result.code === 'E_NOT_PHYSICAL' && !isJudged(frequencyHz),
  )
  if (!wrong) return []
  const message =
    `At ${figure(megahertz(wrong.frequencyHz), 3)} MHz, outside the bands judged, the open or short standard cannot ` +
    'be right: the bands judged may be too good. Keep leads and fixture on for all three, lift only the resistor.'
  return [{ code: 'W_STANDARD', message }]
}

function storedSweep(row: BandRow<ThreeTermination>) {
  const { gMax, intrinsicLossDb, openShortDistance, swr } = row.at
  return { ...storedEfficiency(row), gMax, intrinsicLossDb, openShortDistance, swr: finiteSwr(swr) }
}

/** A total reflection has no SWR that JSON can carry: null. */
function finiteSwr(swr: ThreeTermination['swr']) {
  const finite = (value: number) => (Number.isFinite(value) ? value : null)
  return { open: finite(swr.open), short: finite(swr.short), load: finite(swr.load) }
}
