import type { Page } from '@playwright/test'
import pg from 'pg'
import { enter } from './support/sign-in.ts'
import { expect, test, type Product } from './support/test.ts'

/** The volunteer's central task, with one thumb, from the tag on the box. */

async function ask(product: Product, text: string, values: unknown[] = []) {
  const client = new pg.Client({ connectionString: product.database.ownerUrl })
  await client.connect()
  try {
    return (await client.query<Record<string, string>>(text, values)).rows
  } finally {
    await client.end()
  }
}

async function tagOf(product: Product, designation: string): Promise<string> {
  const sql = 'SELECT tag FROM item WHERE designation = $1 AND retired_at IS NULL'
  const [row] = await ask(product, sql, [designation])
  return row!.tag!
}

/** The phone's clock, twenty minutes back, so that a test run through it ends before now. */
async function ownClock(page: Page): Promise<void> {
  await page.clock.install({ time: new Date(Date.now() - 20 * 60_000) })
}

async function begin(page: Page, product: Product, designation: string): Promise<void> {
  await ownClock(page)
  await page.goto(`/t/${await tagOf(product, designation)}`)
  await enter(page, 'lupe')
  await expect(page.getByRole('heading', { level: 1 })).toContainText(designation)
  await page.getByRole('button', { name: 'Record a test' }).click()
  await page.getByRole('link', { name: 'Heat test' }).last().click()
  await page.getByLabel('Band').selectOption('10 m')
  await page.getByLabel('Air around it').fill('22')
  await page.getByLabel('I have read the cautions').check()
  await page.getByRole('button', { name: 'Key down now' }).click()
}

async function read(page: Page, celsius: number): Promise<void> {
  for (const key of String(celsius)) await page.getByRole('button', { name: key, exact: true }).click()
  await page.getByRole('button', { name: 'Enter the reading' }).click()
}

test('a tag leads through sign-in to the item, and a full run is recorded with its finding', async ({
  page,
  product,
}) => {
  await begin(page, product, 'XFM-02')
  await read(page, 22)
  for (const [minutes, celsius] of [
    [1, 27],
    [1, 32],
    [1, 36],
    [2, 44],
    [3, 53],
    [2, 58],
  ] as const) {
    await page.clock.fastForward(minutes * 60_000)
    await expect(page.getByText('Read the temperature now')).toBeVisible()
    await read(page, celsius)
  }
  await page.getByRole('button', { name: 'Key released' }).click()
  await page.getByRole('button', { name: 'Go on without the cooling reading' }).click()
  await page.getByRole('button', { name: 'Record the test' }).click()
  await expect(page.getByText('Recorded for XFM-02.')).toBeVisible()
  await expect(page.getByText('Pass').first()).toBeVisible()
  await expect(page.getByText(/Limit:.*85/)).toBeVisible()
})

test('the alarm says stop at the limit temperature, and the failed test limits the kit', async ({
  page,
  product,
}) => {
  await begin(page, product, 'XFM-03')
  await read(page, 22)
  await page.clock.fastForward(8 * 60_000)
  await read(page, 86)
  await expect(page.getByRole('alert')).toContainText('Stop')
  await page.getByRole('button', { name: 'Key released' }).click()
  await page.getByRole('button', { name: 'Go on without the cooling reading' }).click()
  await page.getByRole('button', { name: 'Record the test' }).click()
  await expect(page.getByText('Fail').first()).toBeVisible()
  await expect(page.getByRole('link', { name: 'K-03' })).toBeVisible()
})

test('a test in progress survives a reload, and the time goes on', async ({ page, product }) => {
  await begin(page, product, 'XFM-06')
  await read(page, 21)
  await page.clock.fastForward(3 * 60_000)
  await page.reload()
  await expect(page.getByRole('timer').first()).toContainText(/^3:/)
  await expect(page.getByRole('cell', { name: '21' })).toBeVisible()
})

test('a server killed while it saves stores the test once, after the phone tries again', async ({
  page,
  product,
}) => {
  await begin(page, product, 'XFM-07')
  await read(page, 22)
  await page.clock.fastForward(8 * 60_000)
  await read(page, 86)
  await page.getByRole('button', { name: 'Key released' }).click()
  await page.getByRole('button', { name: 'Go on without the cooling reading' }).click()
  const before = await countOf(product, 'XFM-07')

  // The request arrives and the process dies: whether the transaction was through or not, the answer is lost.
  await page.route('**/api/v1/tests/*', async (route) => {
    const arriving = route.fetch().catch(() => undefined)
    await Promise.race([arriving, new Promise((resolve) => setTimeout(resolve, 15))])
    await product.kill()
    await route.abort('connectionreset')
  })
  await page.getByRole('button', { name: 'Record the test' }).click()
  await expect(page.getByText('The readings are still here')).toBeVisible()

  await page.unroute('**/api/v1/tests/*')
  await product.restart()
  await page.getByRole('button', { name: 'Record the test' }).click()
  await expect(page.getByText('Recorded for XFM-07.')).toBeVisible()
  expect(await countOf(product, 'XFM-07')).toBe(before + 1)
})

async function countOf(product: Product, designation: string): Promise<number> {
  const sql = `SELECT count(*)::text AS n FROM test t JOIN item i ON i.id = t.item_id
    WHERE i.designation = $1 AND i.retired_at IS NULL`
  return Number((await ask(product, sql, [designation]))[0]!.n)
}
