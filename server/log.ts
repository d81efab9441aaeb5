import { pino, type Logger } from 'pino'

/** One JSON line an event on standard output. Secrets never reach it; these paths are cut as a second fence. */
export function createLog(level: string): Logger {
  return pino({
    level,
    base: null,
    timestamp: pino.stdTimeFunctions.isoTime,
    redact: [
      'password',
      '*.password',
      'token',
      '*.token',
      'headers.cookie',
      'headers.authorization',
      'err.parameters',
    ],
  })
}
