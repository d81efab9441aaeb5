import { isUtf8 } from 'node:buffer'
import type { Request, Response } from 'express'
import { AppError } from '../errors.ts'
import { readBytes } from './read-bytes.ts'

const LIMIT_BYTES = 100 * 1024
const MAX_DEPTH = 20
const MAX_LENGTH = 1000
const MAX_KEY_LENGTH = 200

/**
 * Reads a JSON body within the limits of promise P25. Refuses by the announced length first, before a byte is read.
 * @throws AppError `request-malformed`, `content-type-refused` or `body-too-large`.
 */
export async function readJsonBody(req: Request, res: Response): Promise<unknown> {
  refuseByHeaders(req, res)
  const body = parseJson(await readWithin(req, res))
  if (typeof body !== 'object' || body === null || Array.isArray(body)) {
    throw new AppError('request-malformed', 'The body must be one JSON object.')
  }
  checkStructure(body, 1)
  return body
}

async function readWithin(req: Request, res: Response): Promise<Buffer> {
  try {
    return await readBytes(req, LIMIT_BYTES)
  } catch (error) {
    // The rest of the body was not read: nothing else can come on this connection.
    res.set('Connection', 'close')
    throw error
  }
}

function parseJson(bytes: Buffer): unknown {
  if (bytes.length === 0) throw new AppError('request-malformed', 'The body is empty: send JSON.')
  if (!isUtf8(bytes)) throw new AppError('request-malformed', 'The body is not UTF-8.')
  try {
    return JSON.parse(bytes.toString('utf8'))
  } catch (error) {
    const reason = error instanceof Error ? error.message.slice(0, 120) : ''
    throw new AppError('request-malformed', `The body is not JSON: ${reason}`)
  }
}

function refuseByHeaders(req: Request, res: Response): void {
  const encoding = req.get('Content-Encoding')
  if (encoding && encoding !== 'identity')
    refuse(res, 'content-type-refused', 'Send the body without an encoding.')
  const type = /^application\/json\s*(?:;\s*charset\s*=\s*"?([\w-]+)"?\s*)?$/i.exec(
    req.get('Content-Type') ?? '',
  )
  if (!type || (type[1] && type[1].toLowerCase() !== 'utf-8')) {
    refuse(res, 'content-type-refused', 'Send application/json in UTF-8.')
  }
  if (Number(req.get('Content-Length') ?? 0) > LIMIT_BYTES) {
    refuse(res, 'body-too-large', `At most ${LIMIT_BYTES / 1024} KiB of JSON.`)
  }
}

function refuse(res: Response, code: 'content-type-refused' | 'body-too-large', detail: string): never {
  res.set('Connection', 'close')
  throw new AppError(code, detail)
}

function checkStructure(value: unknown, depth: number): void {
  if (typeof value !== 'object' || value === null) return
  if (depth > MAX_DEPTH) throw new AppError('request-malformed', `Nested deeper than ${MAX_DEPTH} levels.`)
  const entries = Object.entries(value)
  if (entries.length > MAX_LENGTH)
    throw new AppError('request-malformed', `More than ${MAX_LENGTH} elements in one place.`)
  for (const [key, inner] of entries) {
    if (key.length > MAX_KEY_LENGTH) throw new AppError('request-malformed', 'A field name is too long.')
    checkStructure(inner, depth + 1)
  }
}
