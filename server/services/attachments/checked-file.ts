import { AppError } from '../../errors.ts'

/** What is kept of a file that was found to be what it says. */
export interface CheckedFile {
  readonly content: Buffer
  readonly mediaType: string
}

/** Faults of the content, with the line where there is one; nothing is stored. */
export function fileFault(detail: string, more: readonly string[] = []): AppError {
  const errors = [detail, ...more].map((each) => ({ pointer: '#/file', detail: each }))
  return new AppError('request-invalid', `${detail} Nothing was stored.`, { errors })
}

/** Content of another kind than the one asked for. */
export function otherKind(detail: string): AppError {
  return new AppError('content-type-refused', `${detail} Nothing was stored.`)
}
