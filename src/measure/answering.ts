import { projectHeat } from '#shared/engine/heat-projection.ts'
import { failure, isFailure, type Outcome } from '#shared/engine/outcome.ts'
import { judgeTest } from '#shared/engine/procedures/judge-test.ts'
import { recogniseTerminations } from '#shared/engine/recognise-terminations.ts'
import { swrTrace } from '#shared/engine/swr-trace.ts'
import { readTouchstone } from '#shared/engine/touchstone/read-touchstone.ts'
import type { TouchstoneFile } from '#shared/engine/touchstone/touchstone-file.ts'
import type { Answer, Ask, FileFacts, QuestionName } from './questions.ts'
import { readThermometerLog } from './thermometer-log.ts'

interface Kept {
  readonly fileName: string
  readonly file: TouchstoneFile
}

type Answerer = { readonly [Name in QuestionName]: (ask: Ask<Name>) => Answer<Name> }

/** Answers with the engine that judges on the server. A file is parsed once and kept until it is forgotten. */
export function makeAnswerer(): Answerer {
  const kept = new Map<string, Kept>()
  return {
    'read-file': ({ id, fileName, bytes }) => {
      const file = readTouchstone(bytes, { fileName })
      if (isFailure(file)) return file
      kept.set(id, { fileName, file })
      return factsOf(file)
    },
    'forget-file': ({ id }) => {
      kept.delete(id)
      return null
    },
    recognise: ({ ids }) => {
      const files = ids.flatMap((id) => kept.get(id) ?? [])
      return recogniseTerminations(files)
    },
    'swr-trace': ({ id }) => {
      const file = kept.get(id)?.file
      return file ? swrTrace(file) : null
    },
    judge: ({ performance, known }) => {
      const files = Object.fromEntries([...kept].map(([id, { file }]) => [id, file]))
      return orFailure(() => judgeTest(performance, known, files))
    },
    project: ({ log, limitC }) => orFailure(() => projectHeat(log, limitC)),
    'read-log': ({ source, answers }) => readThermometerLog(source, answers),
  }
}

/** The engine throws only for what cannot be, such as a rule whose limits an older server wrote. */
function orFailure<T>(work: () => Outcome<T>): Outcome<T> {
  try {
    return work()
  } catch {
    return failure('E_PREVIEW', 'No figures can be shown before it is recorded.')
  }
}

function factsOf(file: TouchstoneFile): FileFacts {
  return {
    ports: file.ports,
    points: file.frequencyHz.length,
    fromHz: file.frequencyHz[0] ?? 0,
    toHz: file.frequencyHz.at(-1) ?? 0,
    referenceOhm: file.referenceOhm,
    notes: [...file.warnings, ...file.info],
  }
}
