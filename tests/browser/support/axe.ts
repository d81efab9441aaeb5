import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import type { Page } from '@playwright/test'
import type { AxeResults } from 'axe-core'

const axe = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8')

const EVERYTHING = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice']
/** What a theme can break: it changes colours and nothing else. */
const COLOURS = ['color-contrast', 'link-in-text-block']

/** Scripts are strict, so axe is injected by the debugger, which the page's own policy does not bind. */
async function violations(page: Page, runOnly: string[]): Promise<string[]> {
  await page.evaluate(axe)
  const results = await page.evaluate(
    (rules) =>
      (window as unknown as { axe: { run(options: object): Promise<AxeResults> } }).axe.run({
        runOnly: rules,
        resultTypes: ['violations'],
      }) as Promise<AxeResults>,
    runOnly,
  )
  return results.violations.map(
    ({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target.join(' ')).join(' | ')}`,
  )
}

/** In both themes; the page is looked at as it stands, so that it is loaded once. */
export async function violationsByTheme(page: Page): Promise<string[]> {
  const found: string[] = []
  for (const theme of ['day', 'night']) {
    await page.evaluate(async (name) => {
      document.documentElement.dataset.theme = name
      // Colours that fade over are looked at when they are there.
      await new Promise(requestAnimationFrame)
      await Promise.allSettled(document.getAnimations().map(({ finished }) => finished))
    }, theme)
    const rules = theme === 'day' ? EVERYTHING : COLOURS
    found.push(...(await violations(page, rules)).map((violation) => `${theme}, ${violation}`))
  }
  return found
}
