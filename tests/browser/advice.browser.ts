import { openAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

/** The quartermaster's question: what brings back most for an hour of work, and what would the board then say? */

test('lists what to do with the quickest way to a station first, and says what the board would say', async ({
  page,
}) => {
  await openAs(page, 'tobin', '/advice')
  const first = page.getByRole('listitem', { name: /Swap XFM-13 into K-18/ })
  await expect(first).toContainText(/15.min: K-18 goes from not fit to proven/)
  await expect(page.getByRole('heading', { level: 2 }).first()).toContainText('Swap XFM-13 into K-18')

  const whatIf = page.getByRole('complementary', { name: 'What if' })
  await expect(whatIf).toContainText('Nothing is stored.')
  await page.getByRole('checkbox', { name: /Swap XFM-13 into K-18/ }).check()
  await expect(whatIf).toContainText(/12 of 20 stations can go/)
  await expect(whatIf).toContainText(/13 of 20 stations can go/)
  await page.getByRole('checkbox', { name: /Boot and update of CMP-17/ }).check()
  await expect(whatIf.getByRole('link', { name: 'K-17' })).toBeVisible()
  await expect(whatIf).toContainText(/1.h 15.min of work/)

  await whatIf.getByRole('button', { name: 'Discard' }).click()
  await expect(whatIf).not.toContainText('13 of 20')
})

test('leads from a piece of work to the form that records it, and the board is as it was', async ({
  page,
}) => {
  await openAs(page, 'ines', '/advice')
  await page.getByRole('link', { name: 'Record it: Boot and update of CMP-17 (K-17)' }).click()
  await expect(page.getByRole('heading', { level: 1 })).toContainText('CMP-17')
  await page.goto('/')
  await expect(page.getByRole('heading', { level: 1 })).toContainText('12 of 20 stations can go')
})

test('names what the group has only one of, with what to do about it', async ({ page }) => {
  await openAs(page, 'oona', '/advice')
  const only = page.getByRole('region', { name: 'Only one of it' })
  await expect(only).toContainText(/Hollis Wrenfield alone has the key of Quarry Bend Grange Locker/)
  await expect(only).toContainText('Give a second person a key')
})
