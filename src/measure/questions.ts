/** What a page may ask the measuring worker, and what it answers. Files are named by the id they are uploaded under. */
import type { HeatLog } from '#shared/engine/heat-log.ts'
import type { HeatProjection } from '#shared/engine/heat-projection.ts'
import type { Outcome } from '#shared/engine/outcome.ts'
import type { Judgement } from '#shared/engine/procedures/judgement.ts'
import type { KnownForTest, Performance } from '#shared/engine/procedures/judge-test.ts'
import type { RecognisedTerminations } from '#shared/engine/recognise-terminations.ts'
import type { SwrTrace } from '#shared/engine/swr-trace.ts'
import type { FileNote } from '#shared/engine/touchstone/touchstone-file.ts'
import type { LogAnswers, LogFailure, ThermometerLog } from './thermometer-log.ts'

/** What was recognised of a Touchstone file. */
export interface FileFacts {
  readonly ports: 1 | 2
  readonly points: number
  readonly fromHz: number
  readonly toHz: number
  readonly referenceOhm: readonly number[]
  readonly notes: readonly FileNote[]
}

export interface Questions {
  /** Reads a file and keeps it under its id. */
  'read-file': {
    ask: { readonly id: string; readonly fileName: string; readonly bytes: Uint8Array }
    answer: Outcome<FileFacts>
  }
  'forget-file': { ask: { readonly id: string }; answer: null }
  /** Which of three kept files is the open, the short and the load. */
  recognise: { ask: { readonly ids: readonly string[] }; answer: Outcome<RecognisedTerminations> }
  /** SWR of a kept one-port file at every point; null when the file is not kept. */
  'swr-trace': { ask: { readonly id: string }; answer: Outcome<SwrTrace> | null }
  judge: {
    ask: { readonly performance: Performance; readonly known: KnownForTest }
    answer: Outcome<Judgement>
  }
  project: { ask: { readonly log: HeatLog; readonly limitC: number }; answer: Outcome<HeatProjection> }
  'read-log': {
    ask: { readonly source: string | Uint8Array; readonly answers: LogAnswers }
    answer: ThermometerLog | LogFailure
  }
}

export type QuestionName = keyof Questions
export type Ask<Name extends QuestionName> = Questions[Name]['ask']
export type Answer<Name extends QuestionName> = Questions[Name]['answer']

export interface Posted<Name extends QuestionName = QuestionName> {
  readonly number: number
  readonly name: Name
  readonly ask: Ask<Name>
}

export interface Answered {
  readonly number: number
  readonly answer: unknown
}
