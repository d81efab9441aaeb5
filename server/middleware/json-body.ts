import express, { type Request, type Response } from 'express'
import { AppError } from '../errors.ts'

const LIMIT_BYTES = 100 * 1024
const MAX_DEPTH = 20
const MAX_LENGTH = 1000
const MAX_KEY_LENGTH = 200

const parser = express.json({ limit: LIMIT_BYTES, inflate: false, strict: false, type: () => true })

/**
 * Reads a JSON body within the limits of promise P25. Refuses by the announced length first: the parser itself would
 * read the whole body before it answers.
 */
export async function readJsonBody(req: Request, res: Response): Promise<unknown> {
  refuseByHeaders(req, res)
  await new Promise<void>((resolve, reject) => {
    parser(req, res, (error?: unknown) => (error ? reject(bodyError(error, res)) : resolve()))
  })
  const body: unknown = req.body
  if (body === undefined) throw new AppError('request-malformed', 'The body is empty: send JSON.')
  if (typeof body !== 'object' || body === null || Array.isArray(body)) {
    throw new AppError('request-malformed', 'The body must be one JSON object.')
  }
  checkStructure(body, 1)
  return body
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

function bodyError(error: unknown, res: Response): unknown {
  const { status, type } = error as { status?: number; type?: string }
  if (status === 413) res.set('Connection', 'close')
  if (type === 'entity.parse.failed') {
    return new AppError(
      'request-malformed',
      `The body is not JSON: ${String((error as Error).message).slice(0, 120)}`,
    )
  }
  return error
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
