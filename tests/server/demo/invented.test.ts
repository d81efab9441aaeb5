import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'

/** Fact 14: nothing in the demo names anything real. */

let demo: DemoApp
let texts: string[]

/** Made by the product or meant for machines: keys, hashes and tags of the product's own alphabet. */
const NO_WORDS = new Set(['id', 'tag', 'digest', 'content_hash', 'password_hash'])

/** Every text that the group's rows hold, in columns and inside of JSON. */
function textsOf(value: unknown): string[] {
  if (typeof value === 'string') return [value]
  if (Array.isArray(value)) return value.flatMap(textsOf)
  if (typeof value !== 'object' || value === null) return []
  return Object.entries(value).flatMap(([key, inner]) => (NO_WORDS.has(key) ? [] : [key, ...textsOf(inner)]))
}

beforeAll(async () => {
  demo = await startDemoApp()
  const tables = await demo.rows<{ name: string }>(
    `SELECT relname AS name FROM pg_class WHERE relkind = 'r' AND relnamespace = 'public'::regnamespace
      AND has_table_privilege(oid, 'SELECT') ORDER BY 1`,
  )
  const rows = await Promise.all(
    tables.map(({ name }) => demo.rows<{ row: unknown }>(`SELECT to_jsonb(t) AS row FROM ${name} t`)),
  )
  texts = [...new Set(rows.flat().flatMap(({ row }) => textsOf(row)))]
}, LOADING_MS)
afterAll(() => demo.close())

const matches = (pattern: RegExp) => [...new Set(texts.flatMap((text) => text.match(pattern) ?? []))]

describe('the texts of the demo', () => {
  it('are many', () => {
    expect(texts.length).toBeGreaterThan(3000)
  })

  it('hold call signs that begin with QX0 alone', () => {
    const callSigns = matches(/\b[A-Z]{1,2}\d[A-Z]{2,3}\b/g)
    expect(callSigns).toHaveLength(22)
    expect(callSigns.filter((callSign) => !/^QX0[A-Z]{3}$/.test(callSign))).toEqual([])
  })

  it('hold telephone numbers of the fictional range alone', () => {
    const numbers = matches(/\(?\d{3}\)?[ .-]\d{3}[ .-]\d{4}\b/g)
    expect(numbers).toHaveLength(25)
    expect(numbers.filter((number) => !/^\(555\) 555-01\d\d$/.test(number))).toEqual([])
  })

  it('hold no domain but example.org, and no address of the web', () => {
    expect(matches(/@[\w.-]+\.\w+/g)).toEqual(['@example.org'])
    expect(matches(/https?:\/\/\S+|www\.\S+/g)).toEqual([])
  })

  it('hold no coordinates', () => {
    expect(matches(/\b(latitude|longitude|lat|lon|lng|grid|locator)\b/gi)).toEqual([])
    expect(matches(/\d{1,3}[.,]\d+\s*°?\s*[NSEW]\b/g)).toEqual([])
    expect(matches(/\b[A-R]{2}\d{2}[a-x]{2}\b/g)).toEqual([])
  })
})
