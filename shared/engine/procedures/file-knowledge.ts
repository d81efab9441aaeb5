import type { BandRegion } from '../band-edges.ts'
import type { Accuracy } from './accuracy.ts'
import type { TestFiles } from './test-files.ts'

/** What every judgement by file depends on besides its inputs and limits. */
export interface FileKnowledge {
  readonly files: TestFiles
  readonly region: BandRegion
  readonly instrument: Accuracy | null
}
