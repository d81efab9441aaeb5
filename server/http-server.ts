import { STATUS_CODES, createServer, type RequestListener, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { randomUUID } from 'node:crypto'
import type { Duplex } from 'node:stream'
import { PROBLEMS, type ProblemCode } from '#shared/contracts/problems.ts'

/** Slow clients must not hold others up (promise P34): headers in 15 s, a whole request in 60 s. */
const LIMITS = { headersTimeout: 15_000, requestTimeout: 60_000, connectionsCheckingInterval: 1000 }

export function createHttpServer(listener: RequestListener): Server {
  const server = createServer(LIMITS, listener)
  server.on('clientError', answerUnreadable)
  return server
}

/** Resolves with the port once the server takes connections. */
export function listen(server: Server, { host, port }: { host: string; port: number }): Promise<number> {
  return new Promise((resolve, reject) => {
    server.once('error', reject)
    server.listen(port, host, () => {
      server.off('error', reject)
      resolve((server.address() as AddressInfo).port)
    })
  })
}

/** Bytes that are no HTTP request get one answer, in the shape of every other error, and the end of the connection. */
function answerUnreadable(error: NodeJS.ErrnoException, socket: Duplex): void {
  if (error.code === 'ECONNRESET' || !socket.writable) return void socket.destroy()
  const code: ProblemCode = error.code === 'HPE_HEADER_OVERFLOW' ? 'headers-too-large' : 'request-malformed'
  const { title, status: usual } = PROBLEMS[code]
  const status = error.code === 'ERR_HTTP_REQUEST_TIMEOUT' ? 408 : usual
  const body = JSON.stringify({ type: `/problems/${code}`, title, status, code, requestId: randomUUID() })
  socket.end(
    [
      `HTTP/1.1 ${status} ${STATUS_CODES[status]}`,
      'Content-Type: application/problem+json',
      `Content-Length: ${Buffer.byteLength(body)}`,
      'Connection: close',
      '',
      body,
    ].join('\r\n'),
  )
}
