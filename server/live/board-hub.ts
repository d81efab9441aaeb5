import type { Response } from 'express'
import type { BoardEvent } from '#shared/contracts/live.ts'
import type { AppContext } from '../context.ts'
import { readInGroup } from '../group-read.ts'
import { REVISION } from '../services/board/board-statements.ts'
import { Listener } from '../listener.ts'

/** An open stream with the session that it was opened by. */
export interface Stream {
  readonly groupId: string
  readonly memberId: string
  readonly sessionId: string
  readonly res: Response
}

/** Changes of a group within this time are told as one: a sweep of all kits is a handful of events. */
const GROUPING_MS = 150
const ARRIVAL_MS = 20
const HEARTBEAT_MS = 20_000
/** A reader that lags by this many bytes is cut; it comes back and fetches the board anew. */
const LONGEST_BACKLOG = 64 * 1024

const STILL_SIGNED_IN = `SELECT sid FROM unnest($1::text[]) AS asked (sid)
  WHERE EXISTS (SELECT FROM find_session(sid, $2))`

/**
 * Tells open screens that their group's board has changed: one connection that listens, one frame a change, one timer
 * for all. Listens only while somebody watches.
 */
export class BoardHub {
  readonly #streams = new Map<string, Set<Stream>>()
  readonly #waiting = new Map<string, BoardEvent>()
  readonly #arrived = new Map<string, Stream[]>()
  readonly #listener: Listener
  #heartbeat: NodeJS.Timeout | undefined

  constructor(private readonly ctx: AppContext) {
    this.#listener = new Listener({
      url: ctx.config.databaseUrl,
      name: 'live',
      channels: ['halyard_board', 'halyard_session_ended'],
      log: ctx.log,
      onMessage: (channel, payload) => this.#hear(channel, payload),
      onConnected: () => this.#catchUp(),
    })
  }

  /** Begins to tell a stream. Its headers are sent already. */
  add(stream: Stream): void {
    const group = this.#streams.get(stream.groupId) ?? new Set()
    this.#streams.set(stream.groupId, group.add(stream))
    stream.res.on('close', () => this.#remove(stream))
    this.#listener.open()
    this.#heartbeat ??= setInterval(() => void this.#beat(), HEARTBEAT_MS)
    // A listener that is only now connecting tells every screen itself.
    if (this.#listener.isConnected) this.#greet(stream)
  }

  /** A crowd that arrives at once is told with one look-up a group. */
  #greet(stream: Stream): void {
    const arrived = this.#arrived.get(stream.groupId)
    if (arrived) return void arrived.push(stream)
    const streams = [stream]
    this.#arrived.set(stream.groupId, streams)
    setTimeout(() => {
      this.#arrived.delete(stream.groupId)
      void this.#tellRevision(stream.groupId, streams)
    }, ARRIVAL_MS)
  }

  /** Ends all streams; their clients come back to another process. */
  stop(): void {
    for (const stream of this.#all()) stream.res.end()
    this.#rest()
  }

  #remove(stream: Stream): void {
    const group = this.#streams.get(stream.groupId)
    group?.delete(stream)
    if (group?.size === 0) this.#streams.delete(stream.groupId)
    if (this.#streams.size === 0) this.#rest()
  }

  #rest(): void {
    clearInterval(this.#heartbeat)
    this.#heartbeat = undefined
    this.#listener.close()
  }

  #all(): Stream[] {
    return [...this.#streams.values()].flatMap((group) => [...group])
  }

  #hear(channel: string, payload: string): void {
    if (channel === 'halyard_board') this.#gather(JSON.parse(payload) as BoardEvent & { groupId: string })
    else void this.#endSignedOut(this.#all().filter(({ memberId }) => memberId === payload))
  }

  #gather({ groupId, revision, kitIds }: BoardEvent & { groupId: string }): void {
    if (!this.#streams.has(groupId)) return
    const waiting = this.#waiting.get(groupId)
    if (!waiting) setTimeout(() => this.#flush(groupId), GROUPING_MS)
    this.#waiting.set(groupId, merged(waiting, { revision, kitIds }))
  }

  #flush(groupId: string): void {
    const event = this.#waiting.get(groupId)
    this.#waiting.delete(groupId)
    if (event) send([...(this.#streams.get(groupId) ?? [])], boardFrame(event))
  }

  /** After a silence nobody knows what was missed: every screen is told where its board stands. */
  #catchUp(): void {
    for (const [groupId, streams] of this.#streams) void this.#tellRevision(groupId, [...streams])
  }

  async #tellRevision(groupId: string, streams: readonly Stream[]): Promise<void> {
    try {
      const question = { statement: REVISION, values: [groupId, this.ctx.clock.now()] }
      const [[state]] = (await readInGroup(this.ctx, groupId, [question])) as unknown as [
        [{ revision: number }],
      ]
      send(streams, boardFrame({ revision: state.revision, kitIds: [] }))
    } catch (error) {
      this.ctx.log.warn({ err: error }, 'live updates: no revision to tell')
    }
  }

  /** Keeps proxies from closing, ends what is signed out or expired, and shows whether the listener is alive. */
  async #beat(): Promise<void> {
    const streams = this.#all()
    send(streams, HEARTBEAT)
    await this.#endSignedOut(streams)
  }

  async #endSignedOut(streams: readonly Stream[]): Promise<void> {
    if (streams.length === 0) return
    const sessions = [...new Set(streams.map(({ sessionId }) => sessionId))]
    const rows = await this.#listener.ask<{ sid: string }>(STILL_SIGNED_IN, [sessions, this.ctx.clock.now()])
    if (!rows) return
    const live = new Set(rows.map(({ sid }) => sid))
    for (const { sessionId, res } of streams) if (!live.has(sessionId)) res.end()
  }
}

const HEARTBEAT = Buffer.from(': still here\n\n')

function boardFrame(event: BoardEvent): Buffer {
  return Buffer.from(`event: board\ndata: ${JSON.stringify(event)}\n\n`)
}

function send(streams: readonly Stream[], frame: Buffer): void {
  for (const { res } of streams) {
    if (res.writableLength > LONGEST_BACKLOG) res.destroy()
    else if (!res.writableEnded) res.write(frame)
  }
}

/** No kit named means any of them, and stays so. */
function merged(one: BoardEvent | undefined, other: BoardEvent): BoardEvent {
  if (!one) return other
  const named = one.kitIds.length > 0 && other.kitIds.length > 0
  return {
    revision: Math.max(one.revision, other.revision),
    kitIds: named ? [...new Set([...one.kitIds, ...other.kitIds])] : [],
  }
}

const hubs = new WeakMap<AppContext, BoardHub>()

/** The hub of this process. */
export function boardHub(ctx: AppContext): BoardHub {
  const hub = hubs.get(ctx) ?? new BoardHub(ctx)
  hubs.set(ctx, hub)
  return hub
}
