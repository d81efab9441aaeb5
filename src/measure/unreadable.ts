import type { Failure } from '#shared/engine/outcome.ts'

/** On a phone a file may be gone by the time its bytes are asked for. */
export const UNREADABLE: Failure = {
  code: 'E_UNREADABLE',
  message: 'The device did not hand this file over: choose it again.',
}
