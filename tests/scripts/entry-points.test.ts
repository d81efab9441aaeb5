import { spawnSync } from 'node:child_process'
import { accessSync, constants, readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it, vi } from 'vitest'
import { root } from '../../scripts/lib/paths.ts'

// Processes and linters take their time on a busy machine.
vi.setConfig({ testTimeout: 60_000 })

const read = (path: string) => readFileSync(join(root, path), 'utf8')

const entryPoints = readdirSync(join(root, 'scripts'), { withFileTypes: true })
  .filter((entry) => entry.isFile() && !entry.name.includes('.'))
  .map((entry) => `scripts/${entry.name}`)

describe.each(entryPoints)('%s', (path) => {
  it('begins with one line that says what it does', () => {
    expect(read(path)).toMatch(/^#!\/usr\/bin\/env bash\n# [A-Z].{20,}[.)]\n/)
  })

  it('can be run', () => {
    expect(() => accessSync(join(root, path), constants.X_OK)).not.toThrow()
  })
})

describe.each(['scripts/start', 'scripts/test'])('%s', (path) => {
  it('says how to use it when asked, and sets nothing up', () => {
    const { status, stdout } = spawnSync(join(root, path), ['--help'], { encoding: 'utf8' })
    expect(status).toBe(0)
    expect(stdout).toMatch(/^Usage: scripts\/\w+ /)
  })

  it('refuses an option that it does not know', () => {
    expect(spawnSync(join(root, path), ['--fast']).status).toBe(64)
  })
})

describe('package sources', () => {
  it('stand in nobody’s file: the lock file records no address', () => {
    const lock = JSON.parse(read('package-lock.json')) as { packages: Record<string, { resolved?: string }> }
    expect(Object.values(lock.packages).filter(({ resolved }) => resolved !== undefined)).toEqual([])
  })

  it.each([
    '.npmrc',
    'package.json',
    'docker/Dockerfile',
    'scripts/lib/setup.sh',
    'scripts/lib/install-packages',
  ])('are not named in %s', (path) =>
    expect(read(path)).not.toMatch(/registry|https?:\/\/(?!127)|\b[a-z]+\.(org|com|io)\b/),
  )
})
