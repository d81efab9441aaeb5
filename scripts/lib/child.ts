/**
 * Child processes that never outlive us. Each one is the leader of a process group of its own, so that a Ctrl-C in
 * the terminal reaches only us and we end things in the right order; and the kernel sends it a signal should we be
 * killed with -9 (setpriv's parent-death signal), which no handler of ours could do.
 */
import { spawn, type ChildProcess, type StdioOptions } from 'node:child_process'
import { constants } from 'node:os'

export interface ChildOptions {
  cwd?: string
  env?: NodeJS.ProcessEnv
  stdio?: StdioOptions
  /** What the child gets when it must end; PostgreSQL's fast shutdown is SIGINT. */
  endSignal?: 'SIGTERM' | 'SIGINT'
  /** Run as this unprivileged user; only root can. */
  user?: string
}

export interface Child {
  readonly process: ChildProcess
  readonly pid: number
  /** Exit code, or 128 + the signal's number. Never rejects. */
  readonly ended: Promise<number>
  /** Asks to end, waits, then kills the whole group. */
  stop(patienceMs?: number): Promise<number>
  signalGroup(signal: NodeJS.Signals): void
}

export function startChild(command: string, args: readonly string[], options: ChildOptions = {}): Child {
  const endSignal = options.endSignal ?? 'SIGTERM'
  const identity = options.user ? [`--reuid=${options.user}`, `--regid=${options.user}`, '--init-groups'] : []
  const child = spawn('setpriv', [...identity, '--pdeathsig', endSignal.slice(3), '--', command, ...args], {
    cwd: options.cwd,
    env: options.env,
    stdio: options.stdio ?? 'inherit',
    detached: true,
  })
  const ended = whenEnded(child)
  const pid = child.pid ?? 0
  const signalGroup = (signal: NodeJS.Signals) => killQuietly(-pid, signal)
  return {
    process: child,
    pid,
    ended,
    signalGroup,
    stop: (patienceMs = 15_000) => stop({ child, ended, endSignal, patienceMs, signalGroup }),
  }
}

interface Stopping {
  child: ChildProcess
  ended: Promise<number>
  endSignal: NodeJS.Signals
  patienceMs: number
  signalGroup: (signal: NodeJS.Signals) => void
}

async function stop({ child, ended, endSignal, patienceMs, signalGroup }: Stopping): Promise<number> {
  if (child.pid === undefined) return ended
  if (child.exitCode === null && child.signalCode === null) child.kill(endSignal)
  const timer = setTimeout(() => signalGroup('SIGKILL'), patienceMs)
  const code = await ended
  clearTimeout(timer)
  // Grandchildren that ignored their parent's end.
  signalGroup('SIGKILL')
  return code
}

function whenEnded(child: ChildProcess): Promise<number> {
  return new Promise((resolve) => {
    child.once('error', () => resolve(127))
    child.once('exit', (code, signal) => resolve(code ?? 128 + (signal ? constants.signals[signal] : 0)))
  })
}

/** A process that is already gone is what we wanted. */
export function killQuietly(pid: number, signal: NodeJS.Signals): void {
  // 0 would be our own group: the child never started.
  if (pid === 0) return
  try {
    process.kill(pid, signal)
  } catch (error) {
    if (!(error instanceof Error && 'code' in error && error.code === 'ESRCH')) throw error
  }
}

export function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0)
    return true
  } catch (error) {
    return error instanceof Error && 'code' in error && error.code === 'EPERM'
  }
}
