import { failure, isFailure, type Outcome, type Warning } from './outcome.ts'
import { checkSameGrid, isOpenAboveShort, isSameTrace, meanReflectedPower } from './termination-traces.ts'
import type { OnePortFile, TouchstoneFile } from './touchstone/touchstone-file.ts'

export type TerminationName = 'open' | 'short' | 'load'

/** For each termination the place (0..2) of its file in the list that was given. */
export type Assignment = Readonly<Record<TerminationName, number>>

export interface RecognisedTerminations {
  readonly assignment: Assignment
  readonly by: 'names' | 'traces'
  /** What the traces say when it is not what the names say. */
  readonly suggestion?: Assignment
  readonly warnings: readonly Warning[]
}

export interface NamedFile {
  readonly fileName: string
  readonly file: TouchstoneFile
}

/** Words in file names, each a word of its own: `xfm-07_open.s1p`. Common practice, no source. */
const WORDS: Readonly<Record<TerminationName, readonly string[]>> = {
  open: ['open', 'opn', 'oc', 'o'],
  short: ['short', 'sht', 'shorted', 'sc', 's'],
  load: ['load', 'loaded', 'ld', 'term', 'terminated', 'l'],
}
const NAMES = ['open', 'short', 'load'] as const
/** Load reflection that is no longer clearly the smallest, as a share of the next one. Our choice. */
const UNSURE_SHARE = 0.8

/**
 * Tells which of three one-port files is the open, the short and the load. Clear names decide; the traces
 * check them, and decide when the names say nothing: the load sends back the least power, and of the others
 * the open has the larger impedance at the lowest frequency. `E_COUNT` unless three files, `E_SAME_TRACE`
 * when two are one measurement, and the codes of `checkSameGrid`. `W_SWAPPED` when names and traces
 * disagree, `W_UNSURE` when the traces alone decide and the load does not stand out. The thresholds are our
 * choice.
 */
export function recogniseTerminations(files: readonly NamedFile[]): Outcome<RecognisedTerminations> {
  const [first, second, third] = files
  if (!first || !second || !third || files.length !== 3) {
    return failure('E_COUNT', `Three files are needed, open, short and load: there are ${files.length}.`)
  }
  const traces = checkSameGrid([first.file, second.file, third.file])
  if (isFailure(traces)) return traces
  const twins = findTwins(traces, files)
  if (twins) return twins
  const byTraces = assignByTraces(traces)
  const byNames = assignByNames(files)
  if (!byNames) {
    return { assignment: byTraces.assignment, by: 'traces', warnings: byTraces.isUnsure ? [unsure()] : [] }
  }
  if (NAMES.every((name) => byNames[name] === byTraces.assignment[name])) {
    return { assignment: byNames, by: 'names', warnings: [] }
  }
  const warnings = [swapped(files, byTraces.assignment)]
  return { assignment: byNames, by: 'names', suggestion: byTraces.assignment, warnings }
}

function assignByNames(files: readonly NamedFile[]): Assignment | undefined {
  const found = files.map(({ fileName }) => nameIn(fileName))
  const [open, short, load] = NAMES.map((name) => found.indexOf(name))
  if (open === undefined || short === undefined || load === undefined) return undefined
  return Math.min(open, short, load) < 0 ? undefined : { open, short, load }
}

/** The one termination a file name speaks of; undefined when it speaks of none or of several. */
function nameIn(fileName: string): TerminationName | undefined {
  const words = fileName
    .replace(/\.[^.]*$/, '')
    .replace(/([a-z])([A-Z])/g, '$1 $2')
    .toLowerCase()
    .split(/[^a-z]+/)
  const matches = NAMES.filter((name) => WORDS[name].some((word) => words.includes(word)))
  return matches.length === 1 ? matches[0] : undefined
}

function assignByTraces(traces: readonly OnePortFile[]): { assignment: Assignment; isUnsure: boolean } {
  const ranked = traces
    .map((file, place) => ({ file, place, reflected: meanReflectedPower(file) }))
    .sort((a, b) => a.reflected - b.reflected)
  const [load, second, third] = ranked as [(typeof ranked)[0], (typeof ranked)[0], (typeof ranked)[0]]
  const [open, short] = isOpenAboveShort(second.file, third.file) ? [second, third] : [third, second]
  return {
    assignment: { open: open.place, short: short.place, load: load.place },
    isUnsure: load.reflected > UNSURE_SHARE * second.reflected,
  }
}

function findTwins(
  traces: readonly [OnePortFile, OnePortFile, OnePortFile],
  files: readonly NamedFile[],
): Outcome<never> | undefined {
  for (const [one, other] of [
    [0, 1],
    [0, 2],
    [1, 2],
  ] as const) {
    if (!isSameTrace(traces[one], traces[other])) continue
    const message = `${files[one]?.fileName} and ${files[other]?.fileName} hold the same trace: measure again.`
    return failure('E_SAME_TRACE', message)
  }
  return undefined
}

function swapped(files: readonly NamedFile[], { open, short, load }: Assignment): Warning {
  const name = (place: number): string => files[place]?.fileName ?? ''
  const message = `By their traces ${name(open)} is the open, ${name(short)} the short, ${name(load)} the load.`
  return { code: 'W_SWAPPED', message }
}

function unsure(): Warning {
  const message = 'No trace stands out as the load: say which file is which.'
  return { code: 'W_UNSURE', message }
}
