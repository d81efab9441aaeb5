/** No page has a barrier that axe finds, in either theme (promise P41). */
import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import type { Page } from '@playwright/test'
import type { AxeResults } from 'axe-core'
import { openAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

const axe = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8')

const PAGES = [
  '/',
  '/kits',
  '/items',
  '/places',
  '/kit-kinds',
  '/build-sheets',
  '/consumables',
  '/due',
  '/forecast',
  '/policy',
  '/policy/new',
  '/people',
  '/people/new',
  '/people/undelivered',
  '/tags',
  '/find',
  '/profile',
  '/more',
]

/** What axe finds in both themes; the page is looked at as it stands, so that it is loaded once. */
async function violations(page: Page): Promise<string[]> {
  // Scripts are strict, so axe is injected by the debugger, which the page's own policy does not bind.
  await page.evaluate(axe)
  const found: string[] = []
  for (const theme of ['day', 'night']) {
    const results = await page.evaluate(async (name) => {
      document.documentElement.dataset.theme = name
      // Colours that fade over are looked at when they are there.
      await new Promise(requestAnimationFrame)
      await Promise.allSettled(document.getAnimations().map(({ finished }) => finished))
      return (window as unknown as { axe: { run(options: object): Promise<AxeResults> } }).axe.run({
        runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'],
      })
    }, theme)
    for (const { id, nodes } of results.violations)
      found.push(`${theme}, ${id}: ${nodes.map(({ target }) => target.join(' ')).join(' | ')}`)
  }
  return found
}

test.beforeEach(async ({ page }, { project }) => {
  await page.setViewportSize({ width: project.name === 'phone' ? 320 : 1280, height: 800 })
})

test('axe finds nothing on any page, and none is wider than the screen', async ({ page }) => {
  test.setTimeout(300_000)
  await page.goto('/')
  expect(await violations(page), 'sign-in').toEqual([])
  await openAs(page, 'tobin')
  for (const path of PAGES) {
    await page.goto(path)
    await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
    await expect(page.locator('[aria-busy="true"]')).toHaveCount(0)
    expect(await violations(page), path).toEqual([])
    const wider = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)
    expect(wider, `${path} is wider than the screen`).toBeLessThanOrEqual(0)
  }
})

test('axe finds nothing on a kit, an item and a test record', async ({ page }) => {
  await openAs(page, 'ines')
  await page.getByRole('row', { name: /^K-07/ }).getByRole('link').first().click()
  await expect(page.getByRole('heading', { level: 1 })).toContainText('K-07')
  expect(await violations(page), 'kit').toEqual([])
  await page
    .getByRole('link', { name: /^Why\?/ })
    .first()
    .click()
  await expect(page.getByRole('heading', { level: 1 })).toContainText(/ of /)
  expect(await violations(page), 'test').toEqual([])
  await page.getByRole('link', { name: /^To / }).click()
  await expect(page.getByText('Latest tests')).toBeVisible()
  expect(await violations(page), 'item').toEqual([])
})
