import type { Page } from '@playwright/test'
import { openAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

/** The net coordinator puts a what-if together, looks at the board as it then would be, and does it or throws it away. */

async function choose(page: Page, what: string, kit: RegExp): Promise<void> {
  await page.getByLabel('What', { exact: true }).selectOption({ label: what })
  const kits = page.getByLabel('Kit', { exact: true })
  const option = kits.getByRole('option', { name: kit })
  await kits.selectOption({ label: (await option.textContent()) ?? '' })
}

const add = (page: Page) => page.getByRole('button', { name: 'Add this change' }).click()
const changes = (page: Page) => page.getByRole('list', { name: 'Changes in mind' }).getByRole('listitem')
const then = (page: Page) => page.getByRole('complementary', { name: 'The board then' })

async function swapTransformer(page: Page): Promise<void> {
  await choose(page, 'Put an item into a kit', /^K-18/)
  await page.getByLabel('Position').selectOption({ label: 'transformer (XFM-10)' })
  const items = page.getByLabel('Transformer')
  await expect(items.getByRole('option', { name: /XFM-13/ })).toBeAttached()
  const spare = await items.getByRole('option', { name: /XFM-13/ }).textContent()
  await items.selectOption({ label: spare!.trim() })
  await add(page)
}

test('asks what a swap and a skipped test would do, throws it away, and the board is as it was', async ({
  page,
}) => {
  await openAs(page, 'oona', '/what-if')
  await swapTransformer(page)
  await expect(changes(page)).toContainText([/Take XFM-10 out of K-18/, /Put XFM-13 into K-18/])
  await expect(then(page)).toContainText(/Not fit.*Proven/s)
  await choose(page, 'Skip a test', /^K-05/)
  await page.getByLabel('Test', { exact: true }).selectOption({ index: 1 })
  await add(page)
  await expect(then(page).getByRole('link', { name: 'K-05' })).toBeVisible()
  await page.reload()
  await expect(changes(page)).toHaveCount(3)
  await then(page).getByRole('button', { name: 'Discard' }).click()
  await expect(changes(page)).toHaveCount(0)
  await page.goto('/')
  await expect(page.getByRole('heading', { level: 1 })).toContainText('12 of 20 stations can go')
})

test('does several changes in one step, keeps the purchase as a note, and the board moves', async ({
  page,
}) => {
  await openAs(page, 'oona', '/what-if')
  await swapTransformer(page)
  await choose(page, 'A kit is available again', /^K-18/)
  await add(page)
  await choose(page, 'Buy a part', /^K-03/)
  await page.getByLabel('Position').selectOption({ label: 'DC lead (DCL-11)' })
  await add(page)
  await expect(changes(page)).toHaveCount(5)
  await expect(then(page)).toContainText(/Now\s*12 of 20 stations can go/)
  await expect(then(page)).toContainText(/13 of 20 stations can go/)
  await expect(then(page)).toContainText('Nothing is bought from here')

  await then(page).getByLabel('Why').fill('Storm on Thursday')
  await then(page).getByRole('button', { name: 'Do it: 3 changes' }).click()
  await expect(then(page)).toContainText('Done: Put XFM-13 into K-18')
  await expect(then(page)).toContainText('Still to do: Buy a new DC lead for K-03')
  await expect(page.getByRole('heading', { name: 'Done before' })).toBeVisible()

  await page.goto('/')
  await expect(page.getByRole('heading', { level: 1 })).toContainText('13 of 20 stations can go')
  await page.getByRole('row', { name: /^K-18/ }).getByRole('link').first().click()
  await expect(page.getByText('XFM-13').first()).toBeVisible()
})
