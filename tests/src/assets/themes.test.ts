import { readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'

const SOURCES = join(import.meta.dirname, '../../../src')
const RULE = /([^{}]*\[data-theme[^{}]*)\{([^{}]*)\}/g

function rulesOfThemes(): { file: string; declarations: string[] }[] {
  return readdirSync(SOURCES, { recursive: true, encoding: 'utf8' })
    .filter((file) => /\.(css|vue)$/.test(file))
    .flatMap((file) =>
      [...readFileSync(join(SOURCES, file), 'utf8').matchAll(RULE)].map(([, , body = '']) => ({
        file,
        declarations: body
          .replace(/\/\*[\s\S]*?\*\//g, '')
          .split(';')
          .map((line) => line.split(':')[0]!.trim())
          .filter(Boolean),
      })),
    )
}

describe('day and night', () => {
  it('differ in the values of custom properties and in nothing else, so that both have the same page', () => {
    const rules = rulesOfThemes()
    expect(rules.length).toBeGreaterThan(0)
    for (const { file, declarations } of rules)
      for (const name of declarations) expect(`${file}: ${name}`).toMatch(/: (--[\w-]+|color-scheme)$/)
  })
})
