import { AppError } from '../errors.ts'

const AWAY = new Set([
  '57P01',
  '57P02',
  '57P03',
  '53300',
  '57014',
  '55P03',
  '40001',
  '40P01',
  '25P03',
  '25P04',
])
const NETWORK = new Set([
  'ECONNREFUSED',
  'ECONNRESET',
  'EPIPE',
  'ETIMEDOUT',
  'ENOTFOUND',
  'EAI_AGAIN',
  'ENOENT',
])
const AWAY_TEXT =
  /timeout exceeded when trying to connect|connection terminated|query read timeout|connection timeout|client has encountered a connection error|connection ended unexpectedly|not queryable|Driver not Connected/i

/** The answer to an error of the database: a conflict, no space, or away for the moment. */
export function fromDatabaseError(error: unknown): AppError | undefined {
  if (!(error instanceof Error)) return undefined
  const code = codeOf(error)
  if (code === '23505') return new AppError('already-exists', duplicateText(error))
  if (code === '23P01')
    return new AppError('state-conflict', 'Somebody else changed this at the same moment. Try again.')
  if (code === '23503')
    return new AppError('not-found', 'Something this refers to does not exist in your group.')
  if (code === '23514' || code === '22001' || code === '22003') {
    return new AppError('request-invalid', 'A value lies outside what can be stored. Nothing was saved.')
  }
  if (code === '53100') return new AppError('storage-full', 'Nothing was stored. Tell the administrator.')
  if (isAway(error, code))
    return new AppError('unavailable', 'The records cannot be reached for the moment. Try again.')
  return undefined
}

function codeOf(error: Error): string | undefined {
  const own = (error as { code?: unknown }).code
  if (typeof own === 'string') return own
  const driver = (error as { driverError?: { code?: unknown } }).driverError?.code
  return typeof driver === 'string' ? driver : undefined
}

function isAway(error: Error, code: string | undefined): boolean {
  if (code && (AWAY.has(code) || NETWORK.has(code) || code.startsWith('08'))) return true
  return AWAY_TEXT.test(error.message)
}

function duplicateText(error: Error): string {
  const constraint =
    (error as { constraint?: string }).constraint ??
    (error as { driverError?: { constraint?: string } }).driverError?.constraint ??
    ''
  if (constraint.includes('serial')) return 'That serial number of that maker and model is taken already.'
  if (constraint.includes('designation')) return 'That designation is taken already.'
  if (constraint.includes('email')) return 'That e-mail address is taken already.'
  return 'Something with that name or number exists already.'
}
