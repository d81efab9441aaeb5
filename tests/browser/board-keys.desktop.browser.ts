import { openAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

test('walks the board by keys, opens a kit, finds the search, and lets single letters be turned off', async ({
  page,
}) => {
  await openAs(page, 'ines')
  await page.getByText('Keys of this page').waitFor()
  const links = page.locator('table.board a.link')
  await page.keyboard.press('j')
  await expect(links.nth(0)).toBeFocused()
  await page.keyboard.press('ArrowDown')
  await page.keyboard.press('j')
  await expect(links.nth(2)).toBeFocused()
  await page.keyboard.press('k')
  await expect(links.nth(1)).toBeFocused()
  await page.keyboard.press('/')
  const search = page.getByRole('searchbox', { name: 'Search kits' })
  await expect(search).toBeFocused()
  await page.keyboard.type('jk/')
  await expect(search).toHaveValue('jk/')
  await search.fill('')

  await page.getByText('Keys of this page').click()
  await page.getByLabel('Single letters work').uncheck()
  await page.getByText('Keys of this page').focus()
  await page.keyboard.press('j')
  await expect(page.getByText('Keys of this page')).toBeFocused()
  await page.getByLabel('Single letters work').check()
  await page.getByText('Keys of this page').focus()
  await page.keyboard.press('j')
  await page.keyboard.press('Enter')
  await expect(page).toHaveURL(/\/kits\//)
})
