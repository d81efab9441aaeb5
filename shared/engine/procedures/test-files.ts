/**
 * Files that a test is read from. They are parsed outside `judgeTest`, which stays a function of values; the server
 * and the browser read the same bytes with the same reader.
 */
import { failure, isFailure, type Outcome } from '../outcome.ts'
import { readTouchstone } from '../touchstone/read-touchstone.ts'
import type { TouchstoneFile } from '../touchstone/touchstone-file.ts'
import type { Performance } from './performance.ts'

export interface FileSource {
  /** Its ending tells the ports: `.s1p`, `.s2p`. */
  readonly fileName: string
  readonly bytes: Uint8Array
}

/** By the id of the attachment. */
export type FileSources = Readonly<Record<string, FileSource>>
export type TestFiles = Readonly<Record<string, TouchstoneFile>>

/** The part that a file plays in a test; also the name of the field that names it. */
export type FileRole = 'file' | 'open' | 'short' | 'load'

export interface NamedFile {
  readonly role: FileRole
  readonly id: string
}

/** The files that the inputs of a test name. Inputs entered by hand name none. */
export function filesNamed(performance: Performance): NamedFile[] {
  if (performance.procedure === 'open-short-load') {
    const { open, short, load } = performance.inputs
    return [
      { role: 'open', id: open },
      { role: 'short', id: short },
      { role: 'load', id: load },
    ]
  }
  const { inputs } = performance
  return 'source' in inputs && inputs.source === 'file' ? [{ role: 'file', id: inputs.file }] : []
}

/** Every source parsed, or the first fault with its line in the message and the file's role as the field. */
export function readTestFiles(sources: FileSources, named: readonly NamedFile[]): Outcome<TestFiles> {
  const files: Record<string, TouchstoneFile> = {}
  for (const [id, { fileName, bytes }] of Object.entries(sources)) {
    const file = readTouchstone(bytes, { fileName })
    if (isFailure(file)) return inFile(file, fileName, named.find((one) => one.id === id)?.role)
    files[id] = file
  }
  return files
}

function inFile(
  { code, message, line }: { code: string; message: string; line?: number },
  fileName: string,
  role: FileRole | undefined,
): Outcome<never> {
  const where = line === undefined ? fileName : `${fileName}, line ${line}`
  return failure(code, `${where}: ${message}`, role === undefined ? {} : { field: role })
}

/** The parsed file of a field, or `E_FILE` when it was not given. */
export function fileOf(files: TestFiles, field: FileRole, id: string): Outcome<TouchstoneFile> {
  return files[id] ?? failure('E_FILE', 'Upload this file first: it is not here.', { field })
}
