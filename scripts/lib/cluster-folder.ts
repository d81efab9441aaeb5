import { spawnSync } from 'node:child_process'
import { chmodSync, chownSync, lstatSync, mkdirSync } from 'node:fs'
import { join } from 'node:path'
import { outsideFolder, root, stateFolder } from './paths.ts'
import { postgresAccount, type Account } from './postgres-programs.ts'

/**
 * The folder for the cluster called `name`, made if need be: inside the clone, or, where PostgreSQL's own user cannot
 * reach the clone (a clone in root's home, say), in a named folder under /var/tmp.
 */
export function clusterFolder(name: string): string {
  const inside = join(stateFolder, name)
  makeFolder(stateFolder)
  makeFolder(inside)
  const account = postgresAccount()
  if (!account || canReach(account, inside)) return inside
  const outside = outsideFolder(root)
  makeFolder(outside)
  refuseStrangers(outside)
  makeFolder(join(outside, name))
  return join(outside, name)
}

/** Open to pass through whatever the umask: what is secret inside closes itself. */
function makeFolder(folder: string): void {
  if (mkdirSync(folder, { recursive: true })) chmodSync(folder, 0o755)
}

function canReach(account: Account, folder: string): boolean {
  const identity = [`--reuid=${account.name}`, `--regid=${account.gid}`, '--init-groups']
  return spawnSync('setpriv', [...identity, '--', 'test', '-x', folder]).status === 0
}

/** /var/tmp is open to everyone: a folder there that another user made, or a link, is not ours to use. */
function refuseStrangers(folder: string): void {
  const found = lstatSync(folder)
  if (!found.isDirectory() || found.uid !== process.getuid?.()) {
    throw new Error(`${folder} was made by someone else. Remove it, then start again.`)
  }
}

/** Makes the folder that PostgreSQL itself writes to, closed to everyone else. */
export function makePrivateFolder(folder: string): void {
  mkdirSync(folder, { recursive: true, mode: 0o700 })
  chmodSync(folder, 0o700)
  const account = postgresAccount()
  if (account) chownSync(folder, account.uid, account.gid)
}
