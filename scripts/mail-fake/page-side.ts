import { createServer, type IncomingMessage, type ServerResponse } from 'node:http'
import type { AddressInfo } from 'node:net'
import type { MailStore } from './mail-store.ts'
import { listPage, mailPage, sandboxedHtml } from './pages.ts'

export interface PageSide {
  port: number
  stop(): Promise<void>
}

const PAGE_POLICY =
  "default-src 'none'; style-src 'unsafe-inline'; frame-src 'self'; base-uri 'none'; form-action 'none'"
/** The mail's own HTML: no script, no request to anywhere; links open in a tab of their own. */
const MAIL_POLICY =
  "sandbox allow-popups allow-popups-to-escape-sandbox; default-src 'none'; style-src 'unsafe-inline'; img-src data:"

interface Answer {
  status: number
  type: string
  body: string
  policy?: string
}

/** A page to read the mails at `/`, and the same as JSON at `/api/mails` for tests. Loopback only. */
export async function startPageSide(store: MailStore, port: number): Promise<PageSide> {
  const server = createServer((request, response) => send(response, answer(store, request)))
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject)
    server.listen(port, '127.0.0.1', resolve)
  })
  return {
    port: (server.address() as AddressInfo).port,
    stop: () =>
      new Promise((resolve) => {
        server.close(() => resolve())
        server.closeAllConnections()
      }),
  }
}

function answer(store: MailStore, { method, headers, url }: IncomingMessage): Answer {
  // A foreign page must not read sign-in links by pointing a name of its own at this machine.
  if (!/^(127\.0\.0\.1|localhost)(:\d+)?$/.test(headers.host ?? ''))
    return plain(403, 'Ask by this machine’s own name.')
  if (method !== 'GET' && method !== 'HEAD') return plain(405, 'Reading only.')
  const path = (url ?? '/').split('?')[0] ?? '/'
  if (path === '/') return page(listPage(store.mails))
  if (path === '/api/mails')
    return { status: 200, type: 'application/json', body: JSON.stringify(store.mails) }
  const [, id, part] = /^\/mails\/([\w-]+)(\/html)?$/.exec(path) ?? []
  const mail = id === undefined ? undefined : store.find(id)
  if (!mail) return plain(404, 'There is no such mail.')
  return part ? { ...page(sandboxedHtml(mail)), policy: MAIL_POLICY } : page(mailPage(mail))
}

function page(body: string): Answer {
  return { status: 200, type: 'text/html; charset=utf-8', body, policy: PAGE_POLICY }
}

function plain(status: number, body: string): Answer {
  return { status, type: 'text/plain; charset=utf-8', body }
}

function send(response: ServerResponse, { status, type, body, policy }: Answer): void {
  response.writeHead(status, {
    'Content-Type': type,
    'Content-Security-Policy': policy ?? "default-src 'none'",
    'X-Content-Type-Options': 'nosniff',
    'Referrer-Policy': 'no-referrer',
    'Cache-Control': 'no-store',
  })
  response.end(body)
}
