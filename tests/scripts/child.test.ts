import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { join } from 'node:path'
import { createInterface } from 'node:readline'
import { describe, expect, it, vi } from 'vitest'
import { isAlive, startChild } from '../../scripts/lib/child.ts'
import { root } from '../../scripts/lib/paths.ts'

// Processes and linters take their time on a busy machine.
vi.setConfig({ testTimeout: 60_000 })

const STUBBORN = 'trap "" TERM; echo ready; sleep 60 & wait; sleep 60'

async function firstLine(stream: NodeJS.ReadableStream | null): Promise<string> {
  if (!stream) throw new Error('The child has no output.')
  const [line] = (await once(createInterface({ input: stream }), 'line')) as [string]
  return line
}

describe('startChild', () => {
  it('tells the exit code, and 128 and the signal for one that was killed', async () => {
    expect(await startChild('sh', ['-c', 'exit 7']).ended).toBe(7)
    const killed = startChild('sleep', ['60'])
    expect(await killed.stop()).toBe(143)
  })

  it('tells 127 for a program that is not there', async () => {
    expect(await startChild('/no-such-folder/program', [], { stdio: 'ignore' }).ended).toBe(127)
  })

  it('kills the whole group of a child that does not end', async () => {
    const child = startChild('sh', ['-c', STUBBORN], { stdio: ['ignore', 'pipe', 'inherit'] })
    await firstLine(child.process.stdout)
    const startedAt = Date.now()
    expect(await child.stop(200)).toBe(137)
    expect(Date.now() - startedAt).toBeLessThan(5000)
  })

  it('leaves no child behind when we are killed with -9', async () => {
    const program = `
      import { startChild } from ${JSON.stringify(join(root, 'scripts/lib/child.ts'))}
      console.log(startChild('sleep', ['60'], { stdio: 'ignore' }).pid)`
    const parent = spawn('node', ['--import', 'tsx', '--input-type=module', '--eval', program], { cwd: root })
    const pid = Number(await firstLine(parent.stdout))
    expect(isAlive(pid)).toBe(true)
    parent.kill('SIGKILL')
    await expect.poll(() => isAlive(pid), { timeout: 5000 }).toBe(false)
  })
})
