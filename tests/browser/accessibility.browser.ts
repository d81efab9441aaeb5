/** No page has a barrier that axe finds, in either theme (promise P41). */
import { violationsByTheme as violations } from './support/axe.ts'
import { openAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

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
  '/advice',
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
