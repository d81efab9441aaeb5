import { gzipSync } from 'node:zlib'
import type { Request, Response } from 'express'
import type { Endpoint } from '#shared/contracts/endpoint.ts'

/** Below this many bytes packing costs more than it saves. */
const GZIP_FROM = 1400

/**
 * Sends an answer through its contract, which drops whatever the contract does not name: a new column cannot leak.
 * A record with a version carries it as its ETag.
 */
export function sendJson(req: Request, res: Response, endpoint: Endpoint, answer: unknown): void {
  res.status(endpoint.status ?? (endpoint.response ? 200 : 204))
  res.set('Cache-Control', 'no-store')
  if (!endpoint.response) return void res.end()
  const value = endpoint.response.parse(answer)
  const version = (value as { version?: unknown }).version
  if (typeof version === 'number') res.set('ETag', `"${version}"`)
  sendJsonBytes(req, res, Buffer.from(JSON.stringify(value)))
}

/** Sends JSON bytes, packed in one call where the client takes it: the streaming middleware costs several times more. */
export function sendJsonBytes(req: Request, res: Response, bytes: Buffer): void {
  res.set('Content-Type', 'application/json; charset=utf-8')
  res.vary('Accept-Encoding')
  if (bytes.length < GZIP_FROM || !req.acceptsEncodings('gzip')) return void res.end(bytes)
  res.set('Content-Encoding', 'gzip')
  res.end(gzipSync(bytes, { level: 1 }))
}
