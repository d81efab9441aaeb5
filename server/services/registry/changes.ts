import { isDeepStrictEqual } from 'node:util'
import { listText } from '#shared/engine/plain-words.ts'
import type { Changes } from './thing.ts'

/** Compares as JSON does: Dates as text, absent and undefined alike, keys in any order. */
export function sameContent(one: unknown, other: unknown): boolean {
  return isDeepStrictEqual(plain(one), plain(other))
}

/** What differs between a row and the columns to be written. Inside of `details` and the like only the fields that differ. */
export function changesOf(row: object, columns: object): Changes {
  const old = row as Record<string, unknown>
  const changes: Changes = { before: {}, after: {} }
  for (const [key, next] of Object.entries(columns)) {
    if (sameContent(old[key] ?? null, next ?? null)) continue
    const both = isObject(old[key]) && isObject(next)
    changes.before[key] = both ? without(old[key] as object, next) : (old[key] ?? null)
    changes.after[key] = both ? without(next, old[key] as object) : (next ?? null)
  }
  return changes
}

export function isEmpty(changes: Changes): boolean {
  return Object.keys(changes.after).length === 0
}

/** Fields whose name in a sentence is not simply their own. */
const NAMES: Readonly<Record<string, string>> = {
  minC: 'lowest temperature',
  maxC: 'highest temperature',
  weightKg: 'weight',
  kitKindId: 'kind',
  sealMatches: 'state of the seal',
}

/** "designation, maker and weight": the names of the fields for a sentence. */
export function fieldNames(changes: Changes): string {
  const names = Object.keys(changes.after).map(
    (key) => NAMES[key] ?? key.replace(/(Id|On)$/, '').replace(/[A-Z]/g, lowerWord),
  )
  return listText(names)
}

const lowerWord = (letter: string) => ` ${letter.toLowerCase()}`

/** The fields of `one` that `other` lacks or has otherwise. */
function without(one: object, other: object): object {
  const rest = other as Record<string, unknown>
  return Object.fromEntries(Object.entries(one).filter(([key, value]) => !sameContent(value, rest[key])))
}

function isObject(value: unknown): value is object {
  return typeof value === 'object' && value !== null && !Array.isArray(value)
}

function plain(value: unknown): unknown {
  return value === undefined ? null : JSON.parse(JSON.stringify(value))
}
