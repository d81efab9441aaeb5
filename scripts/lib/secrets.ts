import { randomBytes } from 'node:crypto'
import { readFileSync, renameSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'

/** Keeps what is made at random beside the data it protects, readable by nobody else. */
export function keptSecrets<Name extends string>(
  folder: string,
  names: readonly Name[],
): Record<Name, string> {
  const path = join(folder, 'secrets.json')
  const known = readSecrets(path)
  const made = Object.fromEntries(names.map((name) => [name, known[name] ?? makeSecret()])) as Record<
    Name,
    string
  >
  if (names.some((name) => known[name] === undefined)) {
    const draft = `${path}.${process.pid}`
    writeFileSync(draft, JSON.stringify({ ...known, ...made }, null, 2), { mode: 0o600 })
    renameSync(draft, path)
  }
  return made
}

/** 256 bits, safe in a URL. */
export function makeSecret(): string {
  return randomBytes(32).toString('hex')
}

function readSecrets(path: string): Partial<Record<string, string>> {
  try {
    return JSON.parse(readFileSync(path, 'utf8')) as Partial<Record<string, string>>
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'ENOENT') return {}
    throw error
  }
}
