import { request, type IncomingHttpHeaders } from 'node:http'

interface RawAnswer {
  readonly status: number
  readonly headers: IncomingHttpHeaders
  /** As it came over the wire: nothing is unpacked. */
  readonly body: string
}

/** A request whose path and answer nobody tidies up, which fetch does. */
export function rawRequest(
  url: string,
  headers: Record<string, string> = {},
  path = new URL(url).pathname,
): Promise<RawAnswer> {
  const { hostname, port } = new URL(url)
  return new Promise((resolve, reject) => {
    const sent = request({ hostname, port, path, headers }, (answer) => {
      let body = ''
      answer.setEncoding('latin1').on('data', (text: string) => (body += text))
      answer.on('end', () => resolve({ status: answer.statusCode ?? 0, headers: answer.headers, body }))
    })
    sent.on('error', reject)
    sent.end()
  })
}
