import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import type { Page } from '@playwright/test'
import type { AxeResults } from 'axe-core'

const axe = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8')

type Rules = readonly string[] | { readonly type: 'rule'; readonly values: readonly string[] }

const EVERYTHING: Rules = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice']

/** What axe reads colours for. By night nothing else differs: see `tests/src/assets/themes.test.ts`. */
const COLOURS: Rules = { type: 'rule', values: ['color-contrast', 'link-in-text-block'] }

/** Scripts are strict, so axe is injected by the debugger, which the page's own policy does not bind. */
async function violations(page: Page, rules: Rules): Promise<string[]> {
  if (!(await page.evaluate(() => 'axe' in window))) await page.evaluate(axe)
  const results = await page.evaluate(
    (runOnly) =>
      (window as unknown as { axe: { run(options: object): Promise<AxeResults> } }).axe.run({
        runOnly,
        resultTypes: ['violations'],
      }) as Promise<AxeResults>,
    rules,
  )
  return results.violations.map(
    ({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target.join(' ')).join(' | ')}`,
  )
}

/** In both themes; the page is looked at as it stands, so that it is loaded once. */
export async function violationsByTheme(page: Page): Promise<string[]> {
  const found: string[] = []
  for (const [theme, rules] of [
    ['day', EVERYTHING],
    ['night', COLOURS],
  ] as const) {
    await page.evaluate(async (name) => {
      document.documentElement.dataset.theme = name
      // Colours that fade over are looked at when they are there.
      await new Promise(requestAnimationFrame)
      await Promise.allSettled(document.getAnimations().map(({ finished }) => finished))
    }, theme)
    found.push(...(await violations(page, rules)).map((violation) => `${theme}, ${violation}`))
  }
  return found
}
