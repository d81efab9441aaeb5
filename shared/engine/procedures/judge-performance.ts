/** The door that both sides use: what was entered, the files it names and what is known, to a judgement. */
import { isFailure, type Outcome } from '../outcome.ts'
import { judgeTest } from './judge-test.ts'
import type { Judgement } from './judgement.ts'
import type { KnownForTest, Performance } from './performance.ts'
import { filesNamed, readTestFiles, type FileSources } from './test-files.ts'

/**
 * Reads the files and judges. `sources` holds the bytes of every file that the inputs name and, where there is one,
 * of the baseline sweep. Faults of a file carry its role as `field` and the line in the message.
 */
export function judgePerformance(
  performance: Performance,
  sources: FileSources,
  known: KnownForTest,
): Outcome<Judgement> {
  const files = readTestFiles(sources, filesNamed(performance))
  return isFailure(files) ? files : judgeTest(performance, known, files)
}

/** The attachments whose bytes `judgePerformance` wants: those named by the inputs, then the baseline's. */
export function filesWanted(performance: Performance, { sweep }: Pick<KnownForTest, 'sweep'>): string[] {
  const named = filesNamed(performance).map(({ id }) => id)
  const isCompared = performance.procedure === 'antenna-sweep' && performance.inputs.source === 'file'
  const baseline = isCompared ? (sweep.baseline?.file ?? null) : null
  return [...new Set(baseline === null ? named : [...named, baseline])]
}
