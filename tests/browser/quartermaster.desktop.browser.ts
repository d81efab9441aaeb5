import { readFileSync } from 'node:fs'
import type { APIResponse, Page } from '@playwright/test'
import { enter, openAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

/** The quartermaster's central tasks: what exists, where it is, and the tags on it. */

const heading = (page: Page) => page.getByRole('heading', { level: 1 })
const designation = (page: Page) => page.getByRole('textbox', { name: 'Designation' })

async function api(page: Page, method: 'GET' | 'POST', path: string, version?: number, data?: object) {
  const origin = new URL(page.url()).origin
  const headers = { Origin: origin, ...(version !== undefined && { 'If-Match': `"${version}"` }) }
  const answer: APIResponse = await page.request.fetch(origin + path, { method, headers, data })
  expect(answer.ok(), `${method} ${path}`).toBe(true)
  return answer.json() as Promise<{ id: string; version: number; rows: { id: string; tag: string }[] }>
}

test('adds an item once the form has what it needs, and moves it to a place', async ({ page }) => {
  await openAs(page, 'tobin', '/items/new')
  await page.getByLabel('Category').selectOption('feedline')
  await page.getByLabel('Velocity factor').fill('84')
  await page.getByRole('button', { name: 'Add the item' }).click()
  await expect(page.getByText('Fill this in.')).toBeVisible()
  await expect(page.getByText('Use 1 or less.')).toBeVisible()
  await expect(designation(page)).toBeFocused()

  await designation(page).fill('FDL-98')
  await page.getByLabel('Velocity factor').fill('0,84')
  await page.getByLabel('Length').fill('15.25')
  await page.getByRole('button', { name: 'Add the item' }).click()
  await expect(heading(page)).toHaveText('FDL-98')
  await expect(page.getByText('15.25 m')).toBeVisible()

  await page.getByRole('button', { name: 'Move' }).click()
  await page.getByRole('combobox', { name: 'Place' }).selectOption({ label: 'Station 4 Cage' })
  await page.getByRole('button', { name: 'Move it' }).click()
  await expect(page.getByRole('link', { name: 'Station 4 Cage' })).toBeVisible()
  await expect(page.getByText(/moved FDL-98/)).toBeVisible()
})

test('keeps search, filters and pages in the address, and walks the rows by key', async ({ page }) => {
  await openAs(page, 'maren', '/items')
  await page.getByLabel('Category').first().selectOption('battery')
  await expect(page).toHaveURL(/category=battery/)
  await expect(page.getByText('45 items')).toBeVisible()

  await page.getByRole('link', { name: 'BAT-001' }).focus()
  await page.keyboard.press('ArrowDown')
  await expect(page.getByRole('link', { name: 'BAT-002' })).toBeFocused()
  await page.keyboard.press('PageDown')
  await expect(page).toHaveURL(/page=2/)
  await expect(page.getByRole('link', { name: 'BAT-026' })).toBeFocused()

  await page.goBack()
  await expect(page.getByRole('link', { name: 'BAT-001' })).toBeVisible()
  await page.goBack()
  await expect(page).toHaveURL(/\/items$/)
})

test('shows a column that was asked for on this device again the next time', async ({ page }) => {
  await openAs(page, 'maren', '/kits')
  const answersForIt = page.getByRole('columnheader', { name: 'Answers for it' })
  await expect(page.getByRole('columnheader', { name: 'Designation' })).toBeVisible()
  await expect(answersForIt).toHaveCount(0)
  await page.getByText('Columns', { exact: true }).click()
  await page.getByRole('checkbox', { name: 'Answers for it' }).check()
  await expect(answersForIt).toBeVisible()
  await page.reload()
  await expect(answersForIt).toBeVisible()
})

test('tells the second of two editors, shows both versions and loses nothing', async ({ page }) => {
  await openAs(page, 'tobin', '/places/new')
  await page.getByRole('textbox', { name: 'Name' }).fill('Pump house')
  await page.getByRole('button', { name: 'Add the place' }).click()
  await expect(heading(page)).toHaveText('Pump house')
  const path = `/api/v1/places/${page.url().split('/').at(-1)}`
  const { version } = await api(page, 'GET', path)

  await page.getByRole('link', { name: 'Edit' }).click()
  await page.getByLabel('Kind of place').fill('brick shed')
  await api(page, 'POST', path, version, { name: 'Pump house', kind: 'stone shed' })
  await page.getByRole('button', { name: 'Save' }).click()
  const dialog = page.getByRole('dialog', { name: 'Somebody else changed this first' })
  await expect(dialog.getByRole('row', { name: /^Kind/ })).toContainText(/brick shed.*stone shed/)
  await dialog.getByRole('button', { name: 'Go back to the form' }).click()
  await expect(page.getByLabel('Kind of place')).toHaveValue('brick shed')

  await page.getByRole('button', { name: 'Save' }).click()
  await dialog.getByRole('button', { name: 'Save mine over theirs' }).click()
  await expect(heading(page)).toHaveText('Pump house')
  await expect(page.getByText('brick shed')).toBeVisible()
})

test('has what was typed back after a reload, and stores it once', async ({ page }) => {
  await openAs(page, 'tobin', '/items/new')
  await page.getByLabel('Category').selectOption('mast')
  await designation(page).fill('MST-97')
  await page.reload()
  await expect(page.getByText('What you typed before and did not save is back.')).toBeVisible()
  await expect(designation(page)).toHaveValue('MST-97')
  await page.getByRole('button', { name: 'Add the item' }).click()
  await expect(heading(page)).toHaveText('MST-97')
  expect((await api(page, 'GET', '/api/v1/items?search=MST-97')).rows).toHaveLength(1)
  await page.goto('/items/new')
  await expect(designation(page)).toHaveValue('')
})

test('plans a kind of kit: positions are added, put in order and removed by buttons', async ({ page }) => {
  await openAs(page, 'tobin', '/kit-kinds/new')
  await page.getByLabel('Code').fill('QX')
  await page.getByRole('textbox', { name: 'Name' }).fill('Quick station')
  for (const name of ['radio', 'battery', 'mast']) {
    await page.getByRole('button', { name: 'Add a position' }).click()
    await page.keyboard.type(name)
    await page.getByLabel('Category').last().selectOption(name)
  }
  await page.getByRole('button', { name: 'Move battery up' }).click()
  await page.getByRole('button', { name: 'Remove mast' }).click()
  await page.getByRole('button', { name: 'Add the kind' }).click()
  await expect(heading(page)).toHaveText('Quick station')
  await expect(page.getByRole('rowheader')).toHaveText(['battery', 'radio'])
})

test('prints the tags of chosen kits and items from the first free cell on', async ({ page }) => {
  await page.goto('/tags')
  await enter(page, 'maren')
  await page.getByLabel('Those that I choose').check()
  await page.getByLabel('Choose K-01').check()
  await page.getByRole('navigation', { name: 'Lists to choose from' }).getByText('Items').click()
  await page.getByRole('searchbox').fill('XFM-1')
  await expect(page.getByText('6 items')).toBeVisible()
  await page.getByLabel('Choose all on this page').check()
  await page.getByRole('radio', { name: 'Cell 5, row 2, column 2' }).check({ force: true })
  await expect(page.getByText('7 tags on 1 sheet, 13 cells stay free.')).toBeVisible()

  const download = page.waitForEvent('download')
  await page.getByRole('button', { name: 'Download the PDF' }).click()
  const file = await download
  expect(file.suggestedFilename()).toBe('tags.pdf')
  expect(
    readFileSync(await file.path())
      .subarray(0, 5)
      .toString(),
  ).toBe('%PDF-')
  await expect(page.getByText(/The PDF with 7 tags was handed to your downloads/)).toBeVisible()
  await expect(page.getByText('First free cell of the first sheet: 12')).toBeVisible()
})
