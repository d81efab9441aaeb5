import { boardEvent, followBoard, type BoardEvent } from '#shared/contracts/live.ts'

const FIRST_WAIT_MS = 1_000
const LONGEST_WAIT_MS = 60_000

interface Follower {
  /** The board of the group has changed. */
  changed(event: BoardEvent): void
  /** Connected, perhaps again: what happened in between was missed. */
  connected(again: boolean): void
  disconnected(): void
}

/**
 * Follows the server-sent events of the group until the function it returns is called. The browser's own source gives
 * up for good when a proxy answers with an error, so a closed one is opened anew, later each time and never by all
 * clients at once.
 */
export function followLive(follower: Follower): () => void {
  let source: EventSource | undefined
  let timer: number | undefined
  let waitMs = FIRST_WAIT_MS
  let connectedBefore = false

  function open(): void {
    source = new EventSource(followBoard.path)
    source.addEventListener('open', () => {
      waitMs = FIRST_WAIT_MS
      follower.connected(connectedBefore)
      connectedBefore = true
    })
    source.addEventListener('board', (event) => {
      const parsed = boardEvent.safeParse(JSON.parse(String((event as MessageEvent).data)))
      if (parsed.success) follower.changed(parsed.data)
    })
    source.addEventListener('error', retryLater)
  }

  function retryLater(): void {
    follower.disconnected()
    if (source?.readyState !== EventSource.CLOSED) return
    source.close()
    timer = window.setTimeout(open, waitMs * (0.5 + Math.random()))
    waitMs = Math.min(waitMs * 2, LONGEST_WAIT_MS)
  }

  open()
  return () => {
    window.clearTimeout(timer)
    source?.close()
  }
}
