import type { Page } from '@playwright/test'
import { v7 as uuidv7 } from 'uuid'
import { openAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

/** Builds: what like units show together, the recall of a batch, and the card for the bench. */

interface Rows {
  rows: { id: string; name: string; designation: string }[]
}

async function idOf(page: Page, path: string, name: string): Promise<string> {
  const answer = await page.request.get(new URL(path, page.url()).href)
  const { rows } = (await answer.json()) as Rows
  const found = rows.find((row) => row.name === name || row.designation === name)
  if (!found) throw new Error(`There is no ${name}`)
  return found.id
}

/** A heat test of a unit that came to the limit, as the bench sent it. */
async function failHeatTest(page: Page, designation: string): Promise<void> {
  const [itemId, instrumentId] = [
    await idOf(page, `/api/v1/items?search=${designation}`, designation),
    await idOf(page, '/api/v1/items?search=IRT-23', 'IRT-23'),
  ]
  const readings = [0, 1, 2, 3, 5, 8].map((minute) => ({ atS: minute * 60, temperatureC: 22 + 7.6 * minute }))
  const inputs = {
    band: '10 m',
    powerW: 50,
    load: 'fixture-2450',
    enclosure: 'closed',
    ambientC: 22,
    readings: [...readings, { atS: 492, temperatureC: 85 }],
    keyUpAtS: 492,
    stoppedAtLimit: true,
  }
  const performedAt = new Date(Date.now() - 15 * 60_000).toISOString()
  const data = { procedure: 'heat-test', itemId, performedAt, instrumentId, method: 'Key-down', inputs }
  const { origin } = new URL(page.url())
  const answer = await page.request.put(`${origin}/api/v1/tests/${uuidv7()}`, {
    headers: { Origin: origin },
    data,
  })
  expect(answer.ok()).toBe(true)
}

test('names the hot batch on its build sheet, and compares that with another one', async ({ page }) => {
  await openAs(page, 'tobin', '/build-sheets')
  await page.getByRole('link', { name: '49:1 on a 240-size toroid' }).click()
  const apart = page.getByRole('region', { name: 'Apart from their siblings' })
  for (const unit of ['XFM-07', 'XFM-08', 'XFM-09', 'XFM-10', 'XFM-11'])
    await expect(apart.getByRole('link', { name: unit, exact: true })).toBeVisible()
  await expect(apart).toContainText(/XFM-11\s+loses 1\.37 dB on 10 m; the median of 14 units is 0\.6\d dB/)
  await expect(page.getByRole('row', { name: /^XFM-07/ })).toContainText(/74\s%.*fails.*departs/)
  await page.getByText('Heat', { exact: true }).click()
  await expect(page.getByRole('row', { name: /^Median/ })).toBeVisible()

  const comparison = page.getByRole('region', { name: 'Comparison' })
  await expect(comparison.getByRole('row').nth(1)).toContainText(/^1\s*49:1 on a 240-size toroid/)
  await page.getByLabel('49:1 on two stacked 140-size toroids').uncheck()
  await expect(page.getByText('Choose at least one.')).toBeVisible()
})

test('shows how far the recall of the hot batch has come, and its control chart', async ({ page }) => {
  await openAs(page, 'maren', '/batches')
  await page.getByRole('link', { name: 'Batch B' }).click()
  const recalls = page.getByRole('region', { name: 'Recalls' })
  await expect(recalls).toContainText('overdue, 1 of 4 units to test')
  await expect(recalls.getByRole('listitem').filter({ hasText: 'XFM-09' })).toContainText(
    /in\s*K-08.*waits for its test/,
  )
  await expect(page.getByText(/The batch as a whole stands apart/)).toBeVisible()
  await expect(page.getByRole('img', { name: /^4 of 4 units are over the limit/ })).toBeVisible()
  await page.getByText('The same numbers as a table').click()
  await expect(page.getByRole('row', { name: /^XFM-11/ })).toContainText(/1\.37.*over the limit.*Fail/)
})

test('recalls batch A when one of its units fails, and lists the kits of its siblings', async ({ page }) => {
  await openAs(page, 'tobin', '/batches')
  await failHeatTest(page, 'XFM-01')
  await page.getByRole('link', { name: 'Batch A' }).click()
  const proposal = page.getByRole('region', { name: 'Its siblings may have the same fault' })
  await expect(proposal).toContainText('XFM-01 reached 85 °C after 8.2 min at 50 W')
  await expect(proposal).toContainText('5 kits would go with one')
  for (const kit of ['K-02', 'K-03', 'K-06', 'K-07', 'K-16'])
    await expect(proposal.getByRole('link', { name: kit })).toBeVisible()

  await proposal.getByRole('button', { name: 'Recall Batch A on 10 m' }).click()
  await page.getByRole('button', { name: 'Recall them' }).click()
  await expect(proposal).toBeHidden()
  const recalls = page.getByRole('region', { name: 'Recalls' })
  await expect(recalls).toContainText('open, 5 of 5 units to test')
  await recalls.getByRole('link', { name: 'K-02' }).click()
  await expect(page.getByText(/^XFM-02: heat test on 10 m is in doubt/).first()).toBeVisible()
})

test('prints a winding card on one sheet of A5 or of half Letter', async ({ page }) => {
  await openAs(page, 'tobin', '/build-sheets')
  await page.getByRole('link', { name: '49:1 on a 240-size toroid' }).click()
  await page.getByRole('link', { name: 'Winding card' }).click()
  await expect(page.getByText('1.16 m: 14 turns × 66 mm + 2 tails × 120 mm')).toBeVisible()
  await expect(page.getByRole('row', { name: /^10 m/ })).toBeVisible()
  expect(await printed(page)).toEqual({ sheets: 1, width: 420, height: 595 })
  await page.getByLabel('Paper').selectOption('Half Letter')
  expect(await printed(page)).toEqual({ sheets: 1, width: 396, height: 612 })
})

/** Sheets, and the size of the first in points, as the browser prints the page. */
async function printed(page: Page) {
  const text = (await page.pdf({ preferCSSPageSize: true })).toString('latin1')
  const [, width = '', height = ''] = /\/MediaBox ?\[0 0 ([\d.]+) ([\d.]+)\]/.exec(text) ?? []
  const sheets = text.match(/\/Type ?\/Page\b/g)?.length
  return { sheets, width: Math.round(Number(width)), height: Math.round(Number(height)) }
}
