import type { BoardRow } from '#shared/contracts/board.ts'
import { SECTIONS, sectionOf } from './board.ts'

/** Which rows stand where. Kept while the reader looks, so that no row moves under a finger. */
export interface SectionLayout {
  readonly section: string
  readonly kitIds: readonly string[]
}

/** Rows by section, in the order in which the service gave them. */
export function layoutOf(rows: readonly BoardRow[]): SectionLayout[] {
  return SECTIONS.map((section) => ({
    section,
    kitIds: rows.filter((row) => sectionOf(row) === section).map(({ kitId }) => kitId),
  }))
}

/** The layout that was there, without rows that have gone and with new ones at the end of their section. */
export function keepLayout(shown: readonly SectionLayout[], rows: readonly BoardRow[]): SectionLayout[] {
  const known = new Set(shown.flatMap(({ kitIds }) => kitIds))
  const present = new Set(rows.map(({ kitId }) => kitId))
  const fresh = layoutOf(rows.filter(({ kitId }) => !known.has(kitId)))
  return shown.map(({ section, kitIds }, index) => ({
    section,
    kitIds: [...kitIds.filter((kitId) => present.has(kitId)), ...(fresh[index]?.kitIds ?? [])],
  }))
}

export function sameLayout(a: readonly SectionLayout[], b: readonly SectionLayout[]): boolean {
  return JSON.stringify(a) === JSON.stringify(b)
}

/** Kits whose row says something else than before. */
export function changedKits(before: readonly BoardRow[], after: readonly BoardRow[]): string[] {
  const known = new Map(before.map((row) => [row.kitId, JSON.stringify(row)]))
  const changed = after.filter((row) => known.get(row.kitId) !== JSON.stringify(row))
  return changed.map(({ kitId }) => kitId)
}

/** Rows that are drawn or left out together. */
export interface Chunk extends SectionLayout {
  readonly index: number
  readonly sectionSize: number
}

const CHUNK_ROWS = 25

/** Sections that hold something, cut into chunks. */
export function chunksOf(layout: readonly SectionLayout[]): Chunk[] {
  return layout.flatMap(({ section, kitIds }) =>
    Array.from({ length: Math.ceil(kitIds.length / CHUNK_ROWS) }, (_none, index) => ({
      section,
      index,
      sectionSize: kitIds.length,
      kitIds: kitIds.slice(index * CHUNK_ROWS, (index + 1) * CHUNK_ROWS),
    })),
  )
}
