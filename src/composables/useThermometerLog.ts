import { shallowRef } from 'vue'
import { isFailure } from '#shared/engine/outcome.ts'
import { askEngine } from '@/measure/ask-engine.ts'
import type { LogAnswers, LogFailure, ThermometerLog } from '@/measure/thermometer-log.ts'
import { UNREADABLE } from '@/measure/unreadable.ts'

/** A thermometer's log on its way in: read in the worker, read again with each answer that the file lacks. */
export function useThermometerLog() {
  const log = shallowRef<ThermometerLog | null>(null)
  const failure = shallowRef<LogFailure | null>(null)
  const answers = shallowRef<LogAnswers>({})
  let source: string | Uint8Array = ''

  async function read(from: string | Uint8Array): Promise<void> {
    source = from
    answers.value = {}
    await again()
  }

  async function readFile(file: Blob): Promise<void> {
    const bytes = await file.arrayBuffer().catch(() => null)
    if (bytes) return read(new Uint8Array(bytes))
    forget()
    failure.value = UNREADABLE
  }

  async function answer(given: LogAnswers): Promise<void> {
    answers.value = { ...answers.value, ...given }
    await again()
  }

  async function again(): Promise<void> {
    const asked = { source, answers: answers.value }
    const away: LogFailure = {
      code: 'E_AWAY',
      message: 'This browser could not read the log: enter it by hand.',
    }
    const found = await askEngine('read-log', asked).catch(() => away)
    // Another log or another answer came meanwhile, or the log was taken over.
    if (asked.source !== source || asked.answers !== answers.value) return
    log.value = isFailure(found) ? null : found
    failure.value = isFailure(found) ? found : null
  }

  function forget(): void {
    source = ''
    log.value = null
    failure.value = null
  }

  return { log, failure, answers, read, readFile, answer, forget }
}
