import { readFileSync, statSync } from 'node:fs'
import { join } from 'node:path'
import { brotliCompressSync, constants } from 'node:zlib'

/** The parts of Vite's manifest that decide what a browser loads. */
export interface ManifestChunk {
  file: string
  isEntry?: boolean
  /** Keys of the chunks that are loaded with this one. */
  imports?: string[]
  css?: string[]
  assets?: string[]
}

export type Manifest = Readonly<Record<string, ManifestChunk>>

/** Performance C1: what the first visit to the board may cost, in KiB over the wire. */
export const BUDGET = { scriptKiB: 75, totalKiB: 110 } as const

export interface FirstLoad {
  scripts: string[]
  styles: string[]
  /** The one font subset that English text needs; the others load only where their characters occur. */
  fonts: string[]
}

/** What the browser loads for a view: the entry and the view's own chunk, each with its static imports. */
export function firstLoad(manifest: Manifest, view: string): FirstLoad {
  const entry = Object.keys(manifest).find((key) => manifest[key]?.isEntry)
  if (entry === undefined) throw new Error('The manifest names no entry.')
  const chunks = [...closure(manifest, [entry, view])].map((key) => chunkOf(manifest, key))
  const unique = (files: string[]) => [...new Set(files)]
  return {
    scripts: unique(chunks.map(({ file }) => file).filter((file) => file.endsWith('.js'))),
    styles: unique(chunks.flatMap(({ css }) => css ?? [])),
    fonts: unique(chunks.flatMap(({ assets }) => assets ?? []).filter(isInterfaceFont)),
  }
}

function closure(manifest: Manifest, from: readonly string[]): Set<string> {
  const found = new Set<string>()
  const waiting = [...from]
  for (let key = waiting.pop(); key !== undefined; key = waiting.pop()) {
    if (found.has(key)) continue
    found.add(key)
    waiting.push(...(chunkOf(manifest, key).imports ?? []))
  }
  return found
}

function chunkOf(manifest: Manifest, key: string): ManifestChunk {
  const chunk = manifest[key]
  if (!chunk) throw new Error(`The manifest has no ${key}.`)
  return chunk
}

/** Holds every character of the interface; the full files load only for the letters of other names. */
function isInterfaceFont(file: string): boolean {
  return /inter-interface.*\.woff2$/.test(file)
}

export interface LoadSize {
  scriptBytes: number
  styleBytes: number
  fontBytes: number
  pageBytes: number
}

/** Text as the server sends it, brotli at its best; fonts are packed already. */
export function measure(dist: string, { scripts, styles, fonts }: FirstLoad): LoadSize {
  const packed = (files: readonly string[]) =>
    files.reduce((total, file) => total + packedBytes(dist, file), 0)
  return {
    scriptBytes: packed(scripts),
    styleBytes: packed(styles),
    fontBytes: fonts.reduce((total, file) => total + statSync(join(dist, file)).size, 0),
    pageBytes: packed(['index.html']),
  }
}

export function packedBytes(dist: string, file: string): number {
  const params = { [constants.BROTLI_PARAM_QUALITY]: constants.BROTLI_MAX_QUALITY }
  return brotliCompressSync(readFileSync(join(dist, file)), { params }).length
}
