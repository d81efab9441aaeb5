import { followBoard } from '#shared/contracts/live.ts'
import type { AppContext } from '../context.ts'
import { boardHub } from '../live/board-hub.ts'
import { ANSWERED, type EndpointRouter } from './endpoint.ts'

/** How long a browser waits before it comes back, ms. */
const RETRY_MS = 3000

export function liveRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(followBoard, async ({ by, req, res }) => {
    res.set({
      'Content-Type': 'text/event-stream; charset=utf-8',
      'Cache-Control': 'no-store',
      // Proxies that gather small writes would hold every event back.
      'X-Accel-Buffering': 'no',
    })
    res.write(`retry: ${RETRY_MS}\n\n`)
    req.socket.setNoDelay(true)
    const { groupId, memberId, sessionId } = by
    boardHub(ctx).add({ groupId, memberId, sessionId, res })
    return ANSWERED
  })
}
