import type { Page } from '@playwright/test'
import { violationsByTheme } from './support/axe.ts'
import { openAs, signIn } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

/** The net coordinator says what a post needs and hears who can do it, who nearly can, and what is missing. */

const NEED = '/?need=40m,voice,60W,12h'
const answer = (page: Page) => page.getByRole('status').filter({ hasText: /can do that|could do that/ })

test('says what is needed, reads who can and what the nearest lacks, and opens the evidence', async ({
  page,
}) => {
  await openAs(page, 'ines')
  await page.getByRole('button', { name: 'What is needed' }).click()
  await page.getByRole('button', { name: '40 m', exact: true }).click()
  await page.getByLabel('Mode').selectOption('voice')
  await page.getByLabel('Power at the antenna').fill('60')
  await page.getByLabel('Lasting').fill('12')
  await expect(answer(page)).toContainText(/\d stations can do that; K-\d\d could if it/)
  await expect(page).toHaveURL(/need=40m,voice,60W,12h/)
  await expect(page.getByRole('heading', { name: /^Can do it/ })).toBeVisible()

  const near = page.getByRole('row', { name: /^K-03/ })
  await expect(near).toContainText('Could if it gave 60 W on 40 m: 42 W now')
  await near.getByRole('link', { name: /^Why\?/ }).click()
  await expect(page.getByRole('heading', { level: 1 })).toContainText(/ of /)
})

test('keeps the need in the address, folds the rest away, and forgets it when it is closed', async ({
  page,
}) => {
  await openAs(page, 'ines', NEED)
  await expect(answer(page)).toContainText('can do that')
  await expect(page.getByLabel('Power at the antenna')).toHaveValue('60')
  await expect(page.getByRole('row', { name: /^K-18/ })).toHaveCount(0)
  await page.getByRole('button', { name: /^Show the \d+ kits that cannot/ }).click()
  await expect(page.getByRole('row', { name: /^K-18/ })).toBeVisible()
  await page.getByRole('button', { name: 'What is needed' }).click()
  await expect(page).toHaveURL((url) => !url.searchParams.has('need'))
  await expect(page.getByRole('heading', { name: /^Can go/ })).toBeVisible()
})

test('answers for a past instant too, keeps what was typed wrongly, and serves observers', async ({
  page,
}) => {
  await signIn(page, 'dana')
  const monthsAgo = new Date(Date.now() - 150 * 86_400_000).toISOString()
  await page.goto(`${NEED}&asOf=${encodeURIComponent(monthsAgo)}`)
  await expect(answer(page)).toContainText('could do that')
  await page.getByLabel('Lasting').fill('twelve')
  await expect(page.getByText('Lasting: use a number from 0.1 to 1000.')).toBeVisible()
  await expect(page.getByLabel('Lasting')).toHaveValue('twelve')
  await expect(page.getByRole('link', { name: /^Why\?/ })).toHaveCount(0)
})

test('moves nothing on the screen while the answer arrives', async ({ page }) => {
  await openAs(page, 'ines')
  await page.addInitScript(() => {
    const moved = window as unknown as { shift: number }
    moved.shift = 0
    new PerformanceObserver((list) => {
      for (const entry of list.getEntries() as (PerformanceEntry & {
        value: number
        hadRecentInput: boolean
      })[])
        if (!entry.hadRecentInput) moved.shift += entry.value
    }).observe({ type: 'layout-shift', buffered: true })
  })
  await page.goto(NEED)
  await expect(page.getByRole('heading', { name: /^Can do it/ })).toBeVisible()
  await page.waitForTimeout(2500)
  expect(await page.evaluate(() => (window as unknown as { shift: number }).shift)).toBeLessThanOrEqual(0.01)
})

test('prints the need and its answer', async ({ page }) => {
  await openAs(page, 'ines', NEED)
  await expect(answer(page)).toContainText('can do that')
  await page.emulateMedia({ media: 'print' })
  await expect(
    page.getByText('Needed: 40 m, voice, 60 W at the antenna, 12 h on own batteries.'),
  ).toBeVisible()
  await expect(answer(page)).toBeVisible()
  await expect(page.getByLabel('Power at the antenna')).toBeHidden()
})

test('axe finds nothing on the answered board by day and night', async ({ page }, { project }) => {
  await page.setViewportSize({ width: project.name === 'phone' ? 320 : 1280, height: 800 })
  await openAs(page, 'ines', NEED)
  await expect(answer(page)).toContainText('can do that')
  await page.getByRole('button', { name: /^Show the \d+ kits that cannot/ }).click()
  expect(await violationsByTheme(page)).toEqual([])
  const wider = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)
  expect(wider).toBeLessThanOrEqual(0)
})
