import { existsSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import type { Request, RequestHandler, Response } from 'express'
import { readBoard } from '#shared/contracts/board.ts'
import type { AppContext } from '../context.ts'
import { SESSION_COOKIE } from '../middleware/session-cookie.ts'
import { readSentence, type FirstSentence } from '../services/board/read-sentence.ts'
import { checkAccess } from './access.ts'

/** Where the application will stand, and the sentence until then. */
const PLACE = '<div id="app"></div>'

/** The page waits no longer for its sentence. */
const LONGEST_WAIT_MS = 300

interface Parts {
  /** Where the built client is. */
  readonly folder: string
  /** As the API has it: reads who calls into `req.caller`. */
  readonly session: readonly RequestHandler[]
}

/**
 * The board's page for somebody with a session has the board's sentence in it, to be read before the application is
 * there, and names in its headers what `early.js` asks for, so that the browser asks a round trip earlier. Where there
 * is no sentence, or not in time, the page is the one of everybody.
 */
export function boardPage(ctx: AppContext, { folder, session }: Parts): RequestHandler {
  const page = readPage(folder)
  return async (req, res, next) => {
    if (!isBoardsPage(req)) return next()
    addLinks(req, res)
    const first =
      page && !isOtherInstant(req) ? await inTime(firstSentence(ctx, session, { req, res })) : undefined
    if (!page || !first) return next()
    // A group's own: nothing of it is kept for who comes after.
    res.set('Cache-Control', 'no-store')
    res.type('html').send(page.replace(PLACE, () => `<div id="app">${frame(first)}</div>`))
  }
}

function readPage(folder: string): string | undefined {
  const path = join(folder, 'index.html')
  return existsSync(path) ? readFileSync(path, 'utf8') : undefined
}

function isBoardsPage(req: Request): boolean {
  const hasSession = req.get('Cookie')?.includes(`${SESSION_COOKIE}=`) ?? false
  return req.method === 'GET' && req.path === '/' && hasSession
}

const queryOf = (req: Request) => new URLSearchParams(req.url.split('?')[1])

/** The sentence is of now. */
const isOtherInstant = (req: Request) => queryOf(req).has('asOf')

/** The addresses must be those of `early.js`. */
function addLinks(req: Request, res: Response): void {
  const query = queryOf(req)
  query.delete('need')
  query.append('size', '200')
  for (const address of ['/api/v1/session', `/api/v1/board?${query}`])
    res.append('Link', `<${address}>; rel=preload; as=fetch; crossorigin`)
}

/** @throws whatever stands in the way: no session, no right, no database. */
async function firstSentence(
  ctx: AppContext,
  session: readonly RequestHandler[],
  { req, res }: { req: Request; res: Response },
): Promise<FirstSentence> {
  for (const handler of session) await pass(handler, req, res)
  const { caller } = req
  checkAccess(readBoard.access, caller)
  return readSentence(ctx, caller!)
}

function pass(handler: RequestHandler, req: Request, res: Response): Promise<void> {
  return new Promise((resolve, reject) => {
    void handler(req, res, (error?: unknown) => (error ? reject(error) : resolve()))
  })
}

/** Undefined where it fails or takes too long: the application asks again and says what is wrong. */
function inTime<Value>(work: Promise<Value>): Promise<Value | undefined> {
  return new Promise((resolve) => {
    const timer = setTimeout(() => resolve(undefined), LONGEST_WAIT_MS)
    work.then(resolve, () => resolve(undefined)).finally(() => clearTimeout(timer))
  })
}

/** As the application draws it, with the styles of `frame.css`. */
function frame({ sentence, demo }: FirstSentence): string {
  const words = `<h1><b>${escaped(sentence.lead)}</b> ${escaped(sentence.rest)}</h1>`
  const demoLine = '<aside class="frame-demo">Demonstration data: nothing here is real.</aside>'
  return (
    (demo ? demoLine : '') +
    '<header class="frame-bar"></header>' +
    `<main class="frame-page"><div class="board-sentence">${words}</div></main>`
  )
}

function escaped(text: string): string {
  return text.replaceAll('&', '&amp;').replaceAll('<', '&lt;')
}
