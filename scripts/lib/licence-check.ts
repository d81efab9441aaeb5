// Fails on any package, however deep, whose licence is not approved; it reads the lock file and what is installed.
import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { licenceFaults, type LockedPackage } from './licences.ts'
import { root } from './paths.ts'

interface LockFile {
  packages: Record<string, { version: string; license?: string }>
}

function lockedPackages(): LockedPackage[] {
  const lock = JSON.parse(readFileSync(join(root, 'package-lock.json'), 'utf8')) as LockFile
  const entries = Object.entries(lock.packages).filter(([path]) => path !== '')
  return entries.map(([path, { version, license }]) => ({
    name: path.slice(path.lastIndexOf('node_modules/') + 'node_modules/'.length),
    version,
    licence: license ?? installedLicence(path),
  }))
}

function installedLicence(path: string): string | undefined {
  try {
    const manifest = JSON.parse(readFileSync(join(root, path, 'package.json'), 'utf8')) as {
      license?: unknown
    }
    return typeof manifest.license === 'string' ? manifest.license : undefined
  } catch {
    return undefined
  }
}

const packages = lockedPackages()
const faults = licenceFaults(packages)
for (const fault of faults) console.error(fault)
console.log(`${packages.length} packages, ${faults.length} without an approved licence`)
process.exit(faults.length === 0 ? 0 : 1)
