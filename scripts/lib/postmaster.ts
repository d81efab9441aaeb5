import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { isAlive, killQuietly } from './child.ts'

/** What PostgreSQL says of itself in `postmaster.pid`: line 1 its pid, line 4 its port, line 8 its state. */
export interface PostmasterState {
  pid: number
  port: number
  isReady: boolean
}

export function postmasterState(dataFolder: string): PostmasterState | null {
  try {
    const lines = readFileSync(join(dataFolder, 'postmaster.pid'), 'utf8').split('\n')
    return { pid: Number(lines[0]), port: Number(lines[3]), isReady: lines[7]?.trim() === 'ready' }
  } catch {
    return null
  }
}

/**
 * A start that was killed with -9 leaves PostgreSQL shutting down behind it; we wait for that, and end it ourselves
 * if nobody did. A pid file whose process is gone, or is another program by now, is PostgreSQL's own to clear.
 */
export async function endLeftoverPostmaster(dataFolder: string): Promise<void> {
  const left = postmasterState(dataFolder)
  if (!left || !isPostmasterOf(left.pid, dataFolder)) return
  const signals: [number, NodeJS.Signals][] = [
    [3000, 'SIGINT'],
    [10_000, 'SIGQUIT'],
    [5000, 'SIGKILL'],
  ]
  for (const [patienceMs, signal] of signals) {
    if (await isGone(left.pid, patienceMs)) return
    killQuietly(left.pid, signal)
  }
  if (!(await isGone(left.pid, 5000))) throw new Error(`PostgreSQL (process ${left.pid}) does not end.`)
}

function isPostmasterOf(pid: number, dataFolder: string): boolean {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0').includes(dataFolder)
  } catch {
    return false
  }
}

async function isGone(pid: number, patienceMs: number): Promise<boolean> {
  const deadline = Date.now() + patienceMs
  while (isAlive(pid)) {
    if (Date.now() > deadline) return false
    await new Promise((resolve) => setTimeout(resolve, 50))
  }
  return true
}
