// Plugins of the client build: what the first screen does not need is left out, what it does need is named early.
import { existsSync } from 'node:fs'
import { readdir, readFile, writeFile } from 'node:fs/promises'
import { join, resolve } from 'node:path'
import { promisify } from 'node:util'
import { brotliCompress, constants, gzip } from 'node:zlib'
import type { Plugin, Rolldown } from 'vite'

const brotli = promisify(brotliCompress)
const gzipBest = promisify(gzip)

const JSON_SCHEMA_MODULES = /[\\/]zod[\\/]v4[\\/]core[\\/](?:json-schema-processors|to-json-schema)\.js$/
const SCHEMA_MODULE = /[\\/]zod[\\/]v4[\\/]classic[\\/]schemas\.js$/
const EXPORTED_NAME = /^export (?:(?:const|function) (\w+)|\{ \w+ as (\w+) \})/gm
const DEFAULTS = /^ {8}core\.config\((?:en\(\)|\{ memoizer: core\.memoizer\(\) \})\);\n/gm
const FORMAT_METHOD =
  /^ {4}\w+\(params\) \{\n {8}return this\.check\(core\._\w+\(Zod\w+, params\)\);\n {4}\},\n/gm

/**
 * Zod without what the client never asks of it: writing schemas as JSON Schema, which only
 * the server does; formats as methods of a string (`z.string().email()`; contracts write `z.email()`); parsers made
 * from text, which the page's security policy forbids and the browser would report as a breach; its English sentences,
 * where forms have their own; and answers that hold themselves, which JSON cannot say.
 */
export function slimZod(): Plugin {
  return {
    name: 'halyard-slim-zod',
    apply: 'build',
    transform(code, id) {
      if (JSON_SCHEMA_MODULES.test(id)) return { code: emptyFunctions(code), map: null }
      if (!SCHEMA_MODULE.test(id)) return undefined
      const slim = code
        .replace(FORMAT_METHOD, '')
        .replace(DEFAULTS, 'return')
        .replaceAll('$ZodObjectJIT', '$ZodObject')
      return { code: slim, map: null }
    },
  }
}

function emptyFunctions(code: string): string {
  const names = [...code.matchAll(EXPORTED_NAME)].map(([, own, renamed]) => own ?? renamed)
  return names.map((name) => `const _${name} = () => undefined\nexport { _${name} as ${name} }`).join('\n')
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

/** Below this many bytes packing saves nothing that counts. */
const PACK_FROM = 1024
const PACKABLE = /\.(?:js|css|html|svg|json)$/

/** Writes every text file a second and third time, packed as well as brotli and gzip can: the server only hands out. */
export function packFiles(): Plugin {
  return {
    name: 'halyard-pack-files',
    apply: 'build',
    async closeBundle() {
      const folder = resolve(this.environment.config.root, this.environment.config.build.outDir)
      // A build that failed has written nothing, and says itself why.
      if (!existsSync(folder)) return
      const names = await readdir(folder, { recursive: true, withFileTypes: true })
      const files = names.filter((entry) => entry.isFile() && PACKABLE.test(entry.name))
      await Promise.all(files.map((entry) => packFile(join(entry.parentPath, entry.name))))
    },
  }
}

async function packFile(path: string): Promise<void> {
  const bytes = await readFile(path)
  if (bytes.length < PACK_FROM) return
  const quality = { params: { [constants.BROTLI_PARAM_QUALITY]: constants.BROTLI_MAX_QUALITY } }
  await Promise.all([
    brotli(bytes, quality).then((packed) => writeFile(`${path}.br`, packed)),
    gzipBest(bytes, { level: constants.Z_BEST_COMPRESSION }).then((packed) =>
      writeFile(`${path}.gz`, packed),
    ),
  ])
}
