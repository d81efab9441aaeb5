import { expect, test } from './support/test.ts'
import { enter, openAs, signIn } from './support/sign-in.ts'

/** The net coordinator's central task: which kits can go, and why. */
test('reads in one sentence how many stations can go, with every kit and its verdict below', async ({
  page,
}) => {
  await page.goto('/')
  await enter(page, 'ines')
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(
    /12 of 20 stations can go,\s+7 of them with limits\.\s+2 are out on issue\.\s+6 cannot be used now\./,
  )
  await expect(page.getByRole('row', { name: /^K-01/ })).toContainText('Proven')
  await expect(page.getByRole('row', { name: /^K-03/ })).toContainText('50 W at most')
})

test('goes from a verdict to the test record behind it', async ({ page }) => {
  await openAs(page, 'oona')
  await page.getByRole('row', { name: /^K-07/ }).getByRole('link').first().click()
  await expect(page.getByRole('heading', { level: 1 })).toContainText('K-07')
  await expect(page.getByText(/40 m out: ANT-07, SWR 3/).first()).toBeVisible()
  await page
    .getByRole('link', { name: /^Why\?.*antenna sweep of ANT-07/ })
    .first()
    .click()
  await expect(page.getByRole('heading', { level: 1 })).toContainText('Antenna sweep of ANT-07')
  await expect(page.getByText('Fail').first()).toBeVisible()
})

test('asks for a past instant, is told that it is as known then, and keeps the question in the address', async ({
  page,
}) => {
  await signIn(page, 'ines')
  const monthsAgo = new Date(Date.now() - 150 * 86_400_000).toISOString()
  await page.goto(`/?asOf=${encodeURIComponent(monthsAgo)}`)
  await expect(page.getByText('as known then')).toBeVisible()
  await expect(page.getByRole('row', { name: /^K-05/ })).toContainText(/10 m/)
  await page.reload()
  await expect(page.getByText('as known then')).toBeVisible()
})

test('keeps a filter in the address and shows what is left', async ({ page }) => {
  await openAs(page, 'ines', '/?verdict=not-fit')
  await expect(page.getByRole('row', { name: /^K-18/ })).toBeVisible()
  await expect(page.getByRole('row', { name: /^K-01/ })).toHaveCount(0)
})

test('opens the distances to keep from a station’s antenna, with the caution first', async ({ page }) => {
  await openAs(page, 'oona')
  await page.getByRole('row', { name: /^K-01/ }).getByRole('link').first().click()
  await page.getByText('RF exposure and feed-point voltage').click()
  await expect(page.getByRole('region', { name: 'Before anybody transmits' })).toBeVisible()
  const row = page.getByRole('row', { name: /^40 m/ })
  const quiet = await row.textContent()
  await page.getByLabel('Emission').selectOption('carrier')
  await expect(row).not.toHaveText(quiet ?? '')
  await expect(row).toContainText(/\d+(\.\d)?\sm.*\d+(\.\d)?\sm.*\sV/)
})
