import { isFailure } from '#shared/engine/outcome.ts'
import { readTouchstone } from '#shared/engine/touchstone/read-touchstone.ts'
import { fileFault, type CheckedFile } from './checked-file.ts'

/** The reader that judges the test later reads it now: what is stored can be judged (promise P26). */
export function checkTouchstone(bytes: Buffer, fileName: string): CheckedFile {
  const file = readTouchstone(bytes, { fileName })
  if (!isFailure(file)) return { content: bytes, mediaType: 'text/plain' }
  const { line, message, code } = file
  throw fileFault(`${line === undefined ? '' : `Line ${line}: `}${message} (${code})`)
}
