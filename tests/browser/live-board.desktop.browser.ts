import { expect, test } from './support/test.ts'
import { openAs } from './support/sign-in.ts'

// K-21 is no station: what other tests read in the board's sentence stays.
test('the board moves by itself when somebody else changes a kit', async ({ page, browser, product }) => {
  await openAs(page, 'ines')
  const row = page.getByRole('row', { name: /^K-21/ })
  await expect(row).not.toContainText('Out of service')

  const elsewhere = await browser.newContext({ baseURL: product.url })
  const other = await elsewhere.newPage()
  await openAs(other, 'oona')
  await other.getByRole('row', { name: /^K-21/ }).getByRole('link').first().click()
  await other.getByRole('button', { name: /availability/i }).click()
  await other.getByLabel('Out of service').check()
  await other.getByLabel('Reason').fill('Lent to a school')
  await other.getByRole('dialog').getByRole('button', { name: 'Save' }).click()
  await expect(other.getByText('Lent to a school').first()).toBeVisible()

  await expect(row).toContainText('Lent to a school')
  await elsewhere.close()
})
