import { readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { expect, it } from 'vitest'

const SERVER = join(import.meta.dirname, '../../server')

/** PostgreSQL keeps a prepared statement under its name: a second text under the same name fails when it is sent. */
it('gives every named statement a name of its own', () => {
  const files = readdirSync(SERVER, { recursive: true, encoding: 'utf8' }).filter((file) =>
    file.endsWith('.ts'),
  )
  const used = new Map<string, string[]>()
  for (const file of files) {
    for (const [, name] of readFileSync(join(SERVER, file), 'utf8').matchAll(
      /name: '([a-z0-9-]+)',\s+text:/g,
    )) {
      used.set(name!, [...(used.get(name!) ?? []), file])
    }
  }
  expect(used.size).toBeGreaterThan(80)
  expect([...used].filter(([, places]) => places.length > 1)).toEqual([])
})
