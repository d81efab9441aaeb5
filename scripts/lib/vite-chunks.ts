// How the client's build is cut into files: few for each page, and no code of other pages in those of the first.
import type { Rolldown } from 'vite'

type Context = Parameters<Rolldown.CodeSplittingNameFunction>[1]

const LIBRARIES = /[\\/]node_modules[\\/](?:@?vue|pinia|vue-router|zod)[\\/]/
const OURS = /[\\/](?:src|shared)[\\/]/

export interface Screens {
  /** The entry and the view of the first screen. */
  readonly first: readonly string[]
  /** Views of somebody who is not signed in yet. */
  readonly door: readonly string[]
  /** Views that are opened in the field, by a printed code or from the first screen. */
  readonly field: readonly string[]
}

/**
 * A visit over a slow line pays for every request and for every byte, so what pages share lies in five files, each
 * needed by nearly all that load it: `core`, the libraries; `common`, what the first screen shares with others; `door`,
 * what signing in shares beyond it; `field`, what the pages of the field share beyond both; `desk`, what only forms and
 * lists share.
 */
export function chunkGroups({ first, door, field }: Screens): Rolldown.CodeSplittingGroup[] {
  const inFirst = loadedWith(first)
  const inDoor = loadedWith(door)
  const inField = loadedWith(field)
  const shared = (name: string, has: (id: string, context: Context) => boolean) => ({
    name: (id: string, context: Context) => (has(id, context) ? name : null),
    debugName: name,
    test: OURS,
    minShareCount: 3,
  })
  return [
    { name: 'core', test: LIBRARIES },
    shared('common', inFirst),
    shared('door', inDoor),
    shared('field', inField),
    shared('desk', () => true),
  ]
}

/** Whether a module is loaded with these files: what they import at once, and so on. */
function loadedWith(files: readonly string[]) {
  let found: Set<string> | undefined
  return (id: string, context: Context): boolean => {
    found ??= closure(files, context)
    return found.has(id)
  }
}

function closure(files: readonly string[], context: Context): Set<string> {
  const found = new Set<string>()
  const waiting = [...files]
  for (let id = waiting.pop(); id !== undefined; id = waiting.pop()) {
    if (found.has(id)) continue
    found.add(id)
    waiting.push(...(context.getModuleInfo(id)?.importedIds ?? []))
  }
  return found
}
