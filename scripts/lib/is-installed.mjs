// Exits 0 when node_modules holds exactly what package-lock.json asks for. Plain JavaScript: it runs before npm ci.
import { readFileSync } from 'node:fs'

/** @param {string} path */
const readPackages = (path) => JSON.parse(readFileSync(path, 'utf8')).packages

/** npm writes the hidden file last: a `npm ci` that was killed leaves none. */
function isInstalled() {
  try {
    const wanted = readPackages('package-lock.json')
    const installed = readPackages('node_modules/.package-lock.json')
    // An optional package for another kind of machine is rightly absent.
    const isThere = ([path, entry]) =>
      path === '' || (installed[path] ? installed[path].version === entry.version : entry.optional === true)
    return Object.entries(wanted).every(isThere) && Object.keys(installed).every((path) => path in wanted)
  } catch {
    return false
  }
}

process.exit(isInstalled() ? 0 : 1)
