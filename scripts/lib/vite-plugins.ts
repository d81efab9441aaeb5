// Plugins of the client build: what the first screen does not need is left out, what it does need is named early.
import type { Plugin, Rolldown } from 'vite'

const JSON_SCHEMA_MODULES = /[\\/]zod[\\/]v4[\\/]core[\\/](?:json-schema-processors|to-json-schema)\.js$/
const EXPORTED_NAME = /^export (?:(?:const|function) (\w+)|\{ \w+ as (\w+) \})/gm

/**
 * Every zod schema can write itself as JSON Schema, which only the server does. The client takes empty functions in
 * its place: a fifth of zod's size.
 */
export function withoutJsonSchema(): Plugin {
  return {
    name: 'halyard-without-json-schema',
    apply: 'build',
    transform(code, id) {
      if (!JSON_SCHEMA_MODULES.test(id)) return undefined
      const names = [...code.matchAll(EXPORTED_NAME)].map(([, own, renamed]) => own ?? renamed)
      const empty = names.map((name) => `const _${name} = () => undefined\nexport { _${name} as ${name} }`)
      return { code: empty.join('\n'), map: null }
    },
  }
}

/**
 * Names the chunks that a view adds to the entry in a meta element of the page, so that `early.js` can ask for them
 * before the application runs.
 */
export function nameEarlyChunks(view: string, metaName: string): Plugin {
  return {
    name: 'halyard-name-early-chunks',
    apply: 'build',
    transformIndexHtml: {
      order: 'post',
      handler(_html, { bundle }) {
        const chunks = Object.values(bundle ?? {}).filter((output) => output.type === 'chunk')
        const entry = chunks.find(({ isEntry }) => isEntry)
        const page = chunks.find(({ facadeModuleId }) => facadeModuleId?.endsWith(view))
        if (!entry || !page) throw new Error(`The build has no entry or no ${view}.`)
        const known = filesOf(entry, chunks)
        const files = [...filesOf(page, chunks)].filter((file) => !known.has(file)).map((file) => `/${file}`)
        return [
          { tag: 'meta', attrs: { name: metaName, content: files.join(' ') }, injectTo: 'head-prepend' },
        ]
      },
    },
  }
}

/** A chunk, what it imports at once, and their styles. */
function filesOf(
  chunk: Rolldown.OutputChunk,
  all: readonly Rolldown.OutputChunk[],
  found = new Set<string>(),
) {
  if (found.has(chunk.fileName)) return found
  found.add(chunk.fileName)
  for (const style of chunk.viteMetadata?.importedCss ?? []) found.add(style)
  for (const name of chunk.imports) {
    const imported = all.find(({ fileName }) => fileName === name)
    if (imported) filesOf(imported, all, found)
  }
  return found
}
