import { mkdirSync, mkdtempSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, expect, it } from 'vitest'
import { treeHash } from '../../scripts/lib/tree-hash.ts'

let folder: string

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'halyard-tree-'))
  mkdirSync(join(folder, 'src/views'), { recursive: true })
  writeFileSync(join(folder, 'src/views/a.ts'), 'one')
  writeFileSync(join(folder, 'index.html'), 'two')
})

afterEach(() => rmSync(folder, { recursive: true }))

const hash = () => treeHash(folder, ['src', 'index.html', 'not-there'])

it('stays the same while nothing changes', () => {
  expect(hash()).toBe(hash())
})

it.each<[string, () => void]>([
  ['a content', () => writeFileSync(join(folder, 'src/views/a.ts'), 'One')],
  ['a name', () => renameSync(join(folder, 'src/views/a.ts'), join(folder, 'src/views/b.ts'))],
  ['a new file', () => writeFileSync(join(folder, 'src/new.ts'), '')],
  ['a lost file', () => rmSync(join(folder, 'index.html'))],
])('changes with %s', (_what, change) => {
  const before = hash()
  change()
  expect(hash()).not.toBe(before)
})
