import type { Page } from '@playwright/test'
import { openAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

/** The board over a slow line: its sentence does not wait for the application (performance C2). */

const SENTENCE = /^\d+ of \d+ stations can go,/

async function placeOfSentence(page: Page) {
  const { x, y, height } = (await page.getByRole('heading', { level: 1 }).boundingBox())!
  return { x: Math.round(x), y: Math.round(y), height: Math.round(height) }
}

test('says which stations can go before the application has loaded, where it stands afterwards too', async ({
  page,
}) => {
  await openAs(page, 'oona')
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(SENTENCE)
  let release = () => {}
  const held = new Promise<void>((resolve) => (release = resolve))
  await page.route('**/assets/*.js', async (route) => {
    await held
    await route.continue()
  })
  await page.reload({ waitUntil: 'commit' })
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(SENTENCE)
  await expect(page.getByText('Demonstration data')).toBeVisible()
  await expect(page.getByRole('table')).toHaveCount(0)
  const early = await placeOfSentence(page)

  release()
  await expect(page.getByRole('row', { name: /^K-01/ })).toBeVisible()
  expect(await placeOfSentence(page)).toEqual(early)
})

test('asks once for the board and moves nothing while it loads', async ({ page }) => {
  await openAs(page, 'oona')
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(SENTENCE)
  await page.addInitScript(() => {
    const moved = window as unknown as { shift: number }
    moved.shift = 0
    new PerformanceObserver((list) => {
      for (const entry of list.getEntries() as (PerformanceEntry & { value: number })[])
        moved.shift += entry.value
    }).observe({ type: 'layout-shift', buffered: true })
  })
  const asked: string[] = []
  page.on('request', (request) => asked.push(new URL(request.url()).pathname))
  await page.reload()
  await expect(page.getByRole('row', { name: /^K-20/ })).toHaveCount(1)
  await page.waitForTimeout(2000)
  expect(await page.evaluate(() => (window as unknown as { shift: number }).shift)).toBeLessThanOrEqual(0.01)
  expect(asked.filter((path) => path === '/api/v1/board' || path === '/api/v1/session').sort()).toEqual([
    '/api/v1/board',
    '/api/v1/session',
  ])
})
