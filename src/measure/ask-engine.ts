import workerAddress from './measuring-worker.ts?worker&url'
import type { Answer, Answered, Ask, Posted, QuestionName } from './questions.ts'

/** Thrown when the worker did not start or ended: figures are missing then, recording is not. */
export class EngineAway extends Error {}

interface Waiting {
  readonly resolve: (answer: unknown) => void
  readonly reject: (reason: EngineAway) => void
}

const waiting = new Map<number, Waiting>()
/** Handed over again to a worker that is started anew. */
const files = new Map<string, Ask<'read-file'>>()
let worker: Worker | undefined
let asked = 0

/**
 * Asks the engine in its worker, which starts with the first question and is shared by all forms. How long an answer
 * took stands in the browser's own record of measures, as `engine:<question>`.
 */
export function askEngine<Name extends QuestionName>(name: Name, ask: Ask<Name>): Promise<Answer<Name>> {
  const number = ++asked
  if (name === 'read-file') files.set((ask as Ask<'read-file'>).id, ask as Ask<'read-file'>)
  if (name === 'forget-file') files.delete((ask as Ask<'forget-file'>).id)
  const start = performance.now()
  return new Promise((resolve, reject) => {
    waiting.set(number, {
      resolve: (answer) => {
        performance.measure(`engine:${name}`, { start })
        resolve(answer as Answer<Name>)
      },
      reject,
    })
    worker ??= startWorker([...files.values()].filter((file) => file !== ask))
    post(worker, { number, name, ask })
  })
}

function post(to: Worker, question: Posted): void {
  to.postMessage(question)
}

function startWorker(known: readonly Ask<'read-file'>[]): Worker {
  const started = new Worker(trusted(workerAddress), { type: 'module', name: 'measuring' })
  started.onmessage = ({ data: { number, answer } }: MessageEvent<Answered>) => {
    waiting.get(number)?.resolve(answer)
    waiting.delete(number)
  }
  started.onerror = giveUp
  started.onmessageerror = giveUp
  for (const ask of known) post(started, { number: 0, name: 'read-file', ask })
  return started
}

function giveUp(): void {
  worker?.terminate()
  worker = undefined
  for (const { reject } of waiting.values()) reject(new EngineAway())
  waiting.clear()
}

interface TrustedTypes {
  createPolicy(
    name: string,
    rules: { createScriptURL: (address: string) => string },
  ): { createScriptURL(address: string): unknown }
}

let policy: ReturnType<TrustedTypes['createPolicy']> | undefined

/** The page's security policy takes the address of a script from this policy only, and this policy knows one. */
function trusted(address: string): string {
  const { trustedTypes } = globalThis as { trustedTypes?: TrustedTypes }
  policy ??= trustedTypes?.createPolicy('halyard-worker', {
    createScriptURL: (wanted) => {
      if (wanted !== workerAddress) throw new TypeError('Only the measuring worker is started.')
      return wanted
    },
  })
  return (policy?.createScriptURL(address) ?? address) as string
}
