import { readBoard as readBoardContract } from '#shared/contracts/board.ts'
import type { AppContext } from '../context.ts'
import { readBoard } from '../services/board/read-board.ts'
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
}
