import { openAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

/** After a storm the coordinator makes what stood in it due, and sees before what that does. */
test('makes exposed items due after weather, with the effect shown before', async ({ page }) => {
  await openAs(page, 'oona', '/due')
  await page.getByRole('link', { name: 'After weather' }).click()
  const effect = page.getByRole('complementary', { name: /What it would do|Done/ })
  await expect(effect).toContainText('nothing is stored yet')
  await page.getByLabel('What happened').fill('Ice storm')
  await page.getByLabel('Kits that are out on issue').check()
  await expect(effect).toContainText(/\d+ checks become due/)
  await effect.getByText('What becomes due').click()
  await expect(effect.getByRole('list', { name: 'Checks' })).toContainText('Antenna sweep')
  await page.getByRole('button', { name: 'Make them due' }).click()
  await expect(effect.getByRole('heading', { name: 'Done' })).toBeVisible()
  await effect.getByRole('list', { name: 'Kits that change' }).getByRole('link', { name: 'K-10' }).click()
  await expect(page.getByRole('heading', { level: 1 })).toContainText('K-10')
  await expect(page.getByText('Not proven').first()).toBeVisible()
})
