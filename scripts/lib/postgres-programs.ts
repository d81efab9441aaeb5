import { execFileSync } from 'node:child_process'
import { accessSync, constants, readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'

/** Where Debian keeps each major version's programs. */
const DEBIAN_FOLDER = '/usr/lib/postgresql'

/** The folder of `initdb` and `postgres`: the version that `dataFolder` was made by, else the newest installed. */
export function postgresPrograms(dataFolder?: string): string {
  const versions = installedVersions()
  const made = dataFolder && versionOf(dataFolder)
  const version = made ?? versions[0]
  if (version === undefined) throw new Error('PostgreSQL is not installed (Debian package postgresql).')
  if (!versions.includes(version)) {
    throw new Error(
      `${dataFolder} was made by PostgreSQL ${version}, which is no longer installed (Debian package postgresql-${version}).`,
    )
  }
  return join(DEBIAN_FOLDER, version, 'bin')
}

function installedVersions(): string[] {
  return listFolder(DEBIAN_FOLDER)
    .filter((version) => isExecutable(join(DEBIAN_FOLDER, version, 'bin', 'initdb')))
    .sort((a, b) => Number(b) - Number(a))
}

function versionOf(dataFolder: string): string | undefined {
  try {
    return readFileSync(join(dataFolder, 'PG_VERSION'), 'utf8').trim()
  } catch {
    return undefined
  }
}

function listFolder(folder: string): string[] {
  try {
    return readdirSync(folder)
  } catch {
    return []
  }
}

function isExecutable(path: string): boolean {
  try {
    accessSync(path, constants.X_OK)
    return true
  } catch {
    return false
  }
}

/** Who a process runs as: a login name with its numbers. */
export interface Account {
  name: string
  uid: number
  gid: number
}

/** PostgreSQL refuses to run as root: then it runs as the user of Debian's package, else as nobody. */
export function postgresAccount(): Account | null {
  if (process.getuid?.() !== 0) return null
  return findAccount('postgres') ?? findAccount('nobody')
}

function findAccount(name: string): Account | null {
  try {
    const ask = (flag: string) =>
      Number(execFileSync('id', [flag, name], { stdio: ['ignore', 'pipe', 'ignore'] }))
    return { name, uid: ask('-u'), gid: ask('-g') }
  } catch {
    return null
  }
}
