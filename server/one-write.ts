import type { Socket } from 'node:net'
import type { PoolClient } from 'pg'

const gathering = new WeakSet<Socket>()

/**
 * What is sent to PostgreSQL in the same turn of the event loop leaves in one write. Each write is a system call and a
 * packet: for a transaction of twenty pipelined statements they cost more than all that is computed in it.
 */
export function inOneWrite(client: PoolClient): void {
  const { stream } = (client as unknown as { connection: { stream: Socket } }).connection
  if (gathering.has(stream)) return
  gathering.add(stream)
  stream.cork()
  process.nextTick(() => {
    gathering.delete(stream)
    stream.uncork()
  })
}
