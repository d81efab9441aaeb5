import { readBoard as readBoardContract } from '#shared/contracts/board.ts'
import { answerNeed } from '#shared/contracts/board-need.ts'
import type { AppContext } from '../context.ts'
import { readBoard } from '../services/board/read-board.ts'
import { readNeed } from '../services/board/read-need.ts'
import { ANSWERED, type EndpointRouter } from './endpoint.ts'
import { sendJsonBytes } from './send-json.ts'

export function boardRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(readBoardContract, async ({ query, by, req, res }) => {
    const board = await readBoard(ctx, by, { query, known: req.get('If-None-Match') })
    // Kept by the browser, asked for anew each time: a board of another revision is never shown.
    res.set('Cache-Control', 'private, no-cache')
    if (board.etag !== null) res.set('ETag', board.etag)
    if (board.kind === 'unchanged') res.status(304).end()
    else sendJsonBytes(req, res, board.bytes)
    return ANSWERED
  })
  endpoints.add(answerNeed, async ({ query, by, req, res }) => {
    const reply = await readNeed(ctx, by, { query, known: req.get('If-None-Match') })
    res.set('Cache-Control', 'private, no-cache')
    if (reply.etag !== null) res.set('ETag', reply.etag)
    if (reply.kind === 'unchanged') res.status(304).end()
    else sendJsonBytes(req, res, Buffer.from(JSON.stringify(reply.answer)))
    return ANSWERED
  })
}
