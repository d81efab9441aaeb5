/** No page has a barrier that axe finds, in either theme (promise P41). */
import { violationsByTheme as violations } from './support/axe.ts'
import { openAs, signIn } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

const PAGES = {
  'what can go and what is due': [
    '/',
    '/due',
    '/forecast',
    '/advice',
    '/what-if',
    '/work-party',
    '/find',
    '/more',
  ],
  'the lists of what there is': [
    '/kits',
    '/items',
    '/places',
    '/kit-kinds',
    '/build-sheets',
    '/consumables',
    '/tags',
  ],
  'people and rules': ['/policy', '/policy/new', '/people', '/people/new', '/people/undelivered', '/profile'],
}

test.beforeEach(async ({ page }, { project }) => {
  await page.setViewportSize({ width: project.name === 'phone' ? 320 : 1280, height: 800 })
})

test('axe finds nothing on the page to sign in', async ({ page }) => {
  await page.goto('/')
  await expect(page.getByRole('button', { name: 'Sign in' })).toBeVisible()
  expect(await violations(page)).toEqual([])
})

// Several pages a test: a browser that has read the application once shows the next page in a third of the time.
for (const [name, paths] of Object.entries(PAGES))
  test(`axe finds nothing on the pages of ${name}, and none is wider than the screen`, async ({ page }) => {
    await signIn(page, 'tobin')
    for (const path of paths) {
      await page.goto(path)
      await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
      await expect(page.locator('[aria-busy="true"]')).toHaveCount(0)
      expect.soft(await violations(page), path).toEqual([])
      const wider = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)
      expect.soft(wider, path).toBeLessThanOrEqual(0)
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
