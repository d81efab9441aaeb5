import { Busboy, type BusboyFileStream } from '@fastify/busboy'
import type { Request, Response } from 'express'
import { AppError } from '../errors.ts'
import { readBytes } from './read-bytes.ts'

export interface UploadedFile {
  /** As the device called it. Never used but to be shown. */
  readonly name: string
  readonly bytes: Buffer
}

/** Boundaries and part headers around the one file. */
const FRAMING_BYTES = 16 * 1024
const FIELD = 'file'

/**
 * Reads a multipart body with exactly one file in the field `file`. Length is refused first (promise P25): only a body
 * within the limit is ever handed to the parser, whole, so that nothing it does can keep a connection waiting.
 * @throws AppError `content-type-refused`, `body-too-large` or `request-malformed`.
 */
export async function readUpload(req: Request, res: Response, limitBytes: number): Promise<UploadedFile> {
  try {
    refuseByHeaders(req, limitBytes)
    const body = await readBytes(req, limitBytes + FRAMING_BYTES)
    return await parseMultipart(body, req.get('Content-Type') ?? '', limitBytes)
  } catch (error) {
    // Something of the body may not have been read: nothing else can come on this connection.
    res.set('Connection', 'close')
    throw error
  }
}

/** RFC 2046: 1 to 70 characters. */
const BOUNDARY = /;\s*boundary=(?:"([^"\r\n]{1,70})"|([\w'()+,./:=?-]{1,70}))\s*(?:;|$)/i

function refuseByHeaders(req: Request, limitBytes: number): void {
  const encoding = req.get('Content-Encoding')
  if (encoding && encoding !== 'identity')
    throw new AppError('content-type-refused', 'Send the body without an encoding.')
  const type = req.get('Content-Type') ?? ''
  if (!/^multipart\/form-data\s*(?:;|$)/i.test(type))
    throw new AppError('content-type-refused', 'Send multipart/form-data with one file.')
  if (!BOUNDARY.test(type))
    throw new AppError('request-malformed', 'The multipart boundary is missing or odd.')
  if (Number(req.get('Content-Length') ?? 0) > limitBytes + FRAMING_BYTES) throw tooLarge(limitBytes)
}

function tooLarge(limitBytes: number): AppError {
  return new AppError('body-too-large', `A file of this kind has at most ${limitBytes / 1024 / 1024} MiB.`)
}

const malformed = (detail: string) => new AppError('request-malformed', detail)

/** Only ever sees a whole body within the limit; whatever goes wrong first is the answer. */
function parseMultipart(body: Buffer, type: string, limitBytes: number): Promise<UploadedFile> {
  return new Promise((resolve, reject) => {
    const found: Promise<UploadedFile>[] = []
    const parser = new Busboy({
      headers: { 'content-type': type },
      isPartAFile: () => true,
      limits: { files: 1, parts: 1, fileSize: limitBytes, headerPairs: 20, headerSize: 8192 },
    })
    parser.on('file', (field, stream, fileName) => {
      const file = collect(stream, { field, name: fileName ?? '', limitBytes })
      file.catch(reject)
      found.push(file)
    })
    for (const event of ['partsLimit', 'filesLimit', 'fieldsLimit'] as const)
      parser.on(event, () => reject(malformed('Send one file and nothing else.')))
    parser.on('error', () => reject(malformed('The multipart body cannot be read.')))
    parser.on('finish', () => {
      const [file] = found
      if (file) file.then(resolve, reject)
      else reject(malformed(`There is no file in the field "${FIELD}".`))
    })
    parser.end(body)
  })
}

async function collect(
  stream: BusboyFileStream,
  { field, name, limitBytes }: { field: string; name: string; limitBytes: number },
): Promise<UploadedFile> {
  const chunks: Buffer[] = []
  try {
    for await (const chunk of stream) chunks.push(chunk as Buffer)
  } catch {
    throw malformed('The multipart body is cut off.')
  }
  if (stream.truncated) throw tooLarge(limitBytes)
  if (field !== FIELD) throw malformed(`Send the file in the field "${FIELD}".`)
  return { name, bytes: Buffer.concat(chunks) }
}
