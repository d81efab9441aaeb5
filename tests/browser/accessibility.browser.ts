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

test('axe finds nothing on the page to sign in', async ({ page }) => {
  await page.goto('/')
  await expect(page.getByRole('button', { name: 'Sign in' })).toBeVisible()
  expect(await violations(page)).toEqual([])
})

for (const path of PAGES)
  test(`axe finds nothing on ${path}, and it is not wider than the screen`, async ({ page }) => {
    await openAs(page, 'tobin', path)
    await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
    await expect(page.locator('[aria-busy="true"]')).toHaveCount(0)
    expect(await violations(page)).toEqual([])
    const wider = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)
    expect(wider).toBeLessThanOrEqual(0)
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
