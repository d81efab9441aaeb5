import { createHash } from 'node:crypto'
import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { join, relative, sep } from 'node:path'
import type { Request, RequestHandler, Response } from 'express'
import { AppError } from '../errors.ts'

interface StaticFile {
  readonly path: string
  /** Of the content, so that two deployments never share one. */
  readonly etag: string
  readonly encodings: readonly Encoding[]
}

type Encoding = 'br' | 'gzip'

const PACKED: Record<Encoding, string> = { br: '.br', gzip: '.gz' }

/** However it is written, an address of the API is none of a page. */
const API = /^\/api(\/|$)/i

/** Names that the build made from the content: they can be kept for ever. */
const HASHED = /^\/assets\//

/**
 * Serves the built client from a list read once at the start: nothing outside it can be named, whatever the path. Any
 * other page address gets `index.html`, whose router knows it.
 */
export function staticFiles(folder: string): RequestHandler {
  const files = readFiles(folder)
  return (req, res, next) => {
    if (req.method !== 'GET' && req.method !== 'HEAD') return next()
    if (API.test(req.path)) return next()
    if (!isReadable(req.path)) throw new AppError('request-malformed', 'The address cannot be read.')
    const file = files.get(req.path) ?? (isPage(req) ? files.get('/index.html') : undefined)
    if (!file) return next()
    send(req, res, file)
  }
}

function isReadable(path: string): boolean {
  try {
    return !decodeURIComponent(path).includes('\0')
  } catch {
    return false
  }
}

/** A page is asked for by its address: no dot in the last part, and HTML is welcome. */
function isPage(req: Request): boolean {
  return req.path === '/' || (!/\.[^/]*$/.test(req.path) && req.accepts('html') === 'html')
}

function send(req: Request, res: Response, file: StaticFile): void {
  res.vary('Accept-Encoding')
  const encoding = file.encodings.find((known) => req.acceptsEncodings(known) === known)
  res.set('ETag', encoding ? `"${file.etag}-${encoding}"` : `"${file.etag}"`)
  res.set('Cache-Control', HASHED.test(req.path) ? 'public, max-age=31536000, immutable' : 'no-cache')
  res.type(file.path.slice(file.path.lastIndexOf('.')))
  if (encoding) res.set('Content-Encoding', encoding)
  const packed = encoding ? PACKED[encoding] : ''
  res.sendFile(file.path + packed, {
    cacheControl: false,
    lastModified: false,
    acceptRanges: false,
    dotfiles: 'allow',
  })
}

function readFiles(folder: string): Map<string, StaticFile> {
  if (!existsSync(folder)) return new Map()
  const paths = readdirSync(folder, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map((entry) => join(entry.parentPath, entry.name))
    .filter(
      (path) =>
        !relative(folder, path)
          .split(sep)
          .some((part) => part.startsWith('.')),
    )
  const known = new Set(paths)
  const served = paths.filter((path) => !/\.(br|gz)$/.test(path))
  return new Map(
    served.map((path) => {
      const etag = createHash('sha256').update(readFileSync(path)).digest('base64url').slice(0, 22)
      const encodings = (['br', 'gzip'] as const).filter((encoding) => known.has(path + PACKED[encoding]))
      return [`/${relative(folder, path)}`, { path, etag, encodings }]
    }),
  )
}
