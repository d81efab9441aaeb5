import { openAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

/** The quartermaster plans an evening: who does what when, with what, on one sheet for each bench. */
test('plans a work party for people, hours and instruments, a sheet for each bench', async ({ page }) => {
  await openAs(page, 'maren', '/advice')
  await page.getByRole('link', { name: 'Plan a work party' }).click()
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Work party')
  await expect(page.getByRole('heading', { name: /^Bench/ })).toHaveCount(4)
  await page.getByLabel(/^Their names/).fill('Lupe, Maren')
  await page.getByLabel('People').fill('2')
  await expect(page.getByRole('heading', { name: /^Bench/ })).toHaveText(['Bench 1: Lupe', 'Bench 2: Maren'])
  await page.getByLabel('Time, h').fill('6')
  await expect(page.getByRole('cell', { name: 'Swap XFM-13 into K-18 for XFM-10' })).toBeVisible()
  await expect(page.getByRole('heading', { name: 'Through the night' })).toBeVisible()
  await expect(page.getByText(/Night 1, /).first()).toBeVisible()

  await page.getByText(/^Instruments: \d/).click()
  for (const box of await page.locator('details[open] input').all()) await box.uncheck()
  await expect(page.getByText('no instrument at hand').first()).toBeVisible()
  await expect(page.getByRole('heading', { name: 'Through the night' })).toHaveCount(0)

  await page.emulateMedia({ media: 'print' })
  await expect(page.getByLabel('People')).toBeHidden()
  const breaks = await page
    .getByRole('region', { name: /^Bench/ })
    .evaluateAll((sheets) => sheets.map((sheet) => getComputedStyle(sheet).breakAfter))
  expect(breaks).toEqual(['page', 'page'])
})
