import type { Page } from '@playwright/test'
import { longPairFile, terminationFiles } from '../support/chosen-files.ts'
import { idOfItem } from './support/items.ts'
import { openAs } from './support/sign-in.ts'
import { expect, test, type Product } from './support/test.ts'

/** From files on a phone to a judged efficiency by band. The figures are those of the calculation sheet, section 4. */

const NAMED = { open: 'xfm open.s1p', short: 'xfm short.s1p', load: 'xfm load.s1p' }
const UNNAMED = { open: 'sweep0007.s1p', short: 'sweep0008.s1p', load: 'sweep0009.s1p' }
const EFFICIENCIES = ['82.6', '82.9', '83.4', '84.2']

async function openForm(page: Page, product: Product, designation: string, procedure: string): Promise<void> {
  const path = `/items/${await idOfItem(product, designation)}/tests/new/${procedure}`
  await openAs(page, 'lupe', path)
  await expect(page.getByRole('heading', { level: 1 })).toContainText(designation)
}

const choose = (page: Page, files: ReturnType<typeof terminationFiles>) =>
  page.getByLabel(/Choose (the three|more) files/).setInputFiles(files)
const live = (page: Page) => page.getByRole('region', { name: 'As it will be judged' })

test('a volunteer goes from three files to a judged efficiency by band in under a minute', async ({
  page,
  product,
}) => {
  await openForm(page, product, 'XFM-02', 'open-short-load')
  const begun = Date.now()
  await choose(page, terminationFiles(UNNAMED))
  await expect(page.getByText('Told apart by their traces')).toBeVisible()
  await page.getByLabel('Load resistance').fill('2450')
  for (const figure of EFFICIENCIES) await expect(live(page)).toContainText(new RegExp(`${figure}.±`))
  await page.getByRole('button', { name: 'Record the test' }).click()
  await expect(page.getByText('Recorded for XFM-02.')).toBeVisible()
  for (const band of ['40 m', '20 m', '15 m', '10 m'])
    await expect(page.getByText(`${band}: 8`)).toBeVisible()
  expect(Date.now() - begun).toBeLessThan(60_000)
})

test('files whose names are swapped are noticed, and a person has the last word', async ({
  page,
  product,
}) => {
  await openForm(page, product, 'XFM-02', 'open-short-load')
  await choose(page, terminationFiles({ ...NAMED, open: NAMED.short, short: NAMED.open }))
  await expect(page.getByRole('alert')).toContainText('By their traces')
  await page.getByRole('button', { name: 'Take what the traces say' }).click()
  await expect(page.getByLabel('Secondary was, in xfm short.s1p')).toHaveValue('open')
  await page.getByLabel('Secondary was, in xfm short.s1p').selectOption('load')
  await expect(page.getByLabel('Secondary was, in xfm load.s1p')).toHaveValue('open')
})

test('a broken file is refused with its line, and the others stay', async ({ page, product }) => {
  await openForm(page, product, 'XFM-02', 'open-short-load')
  const [open, short] = terminationFiles(NAMED)
  const broken = {
    ...open!,
    name: 'load.s1p',
    buffer: Buffer.from('# MHz S RI R 50\n7.1 0.1 0\n7,2 0.1 0\n'),
  }
  await choose(page, [open!, short!, broken])
  await expect(page.getByText('Line 3:')).toBeVisible()
  await expect(page.getByText('1 port, 5 points')).toHaveCount(2)
})

test('files and figures survive an error, and trying again stores the test once', async ({
  page,
  product,
}) => {
  await openForm(page, product, 'XFM-03', 'open-short-load')
  await choose(page, terminationFiles(NAMED))
  await page.getByLabel('Load resistance').fill('2450')
  await expect(live(page)).toContainText('±')

  // The second file and the test itself are cut off once each.
  let cut = 0
  await page.route('**/api/v1/attachments/*', (route) => (++cut === 2 ? route.abort() : route.continue()))
  let sent = 0
  await page.route('**/api/v1/tests/*', async (route) => {
    if (++sent > 1) return route.continue()
    await route.fetch()
    await route.abort('connectionreset')
  })
  const record = page.getByRole('button', { name: 'Record the test' })
  for (let failed = 0; failed < 2; failed += 1) {
    await record.click()
    await expect(page.getByText('the files you chose are still here')).toBeVisible()
    await expect(record).toBeEnabled()
  }
  await record.click()
  await expect(page.getByText('Recorded for XFM-03.')).toBeVisible()
  // Three files, one of which was cut off and sent again.
  expect(cut).toBe(4)
  await page.goto(`/items/${await idOfItem(product, 'XFM-03')}`)
  await expect(page.getByRole('link', { name: 'Open, short and load sweep' })).toHaveCount(1)
})

test('a two-port file of 10,001 points is read and judged beside the page, which stays quick', async ({
  page,
  product,
}, testInfo) => {
  await openForm(page, product, 'XFM-02', 'pair-loss')
  await page.getByLabel('Analyzer’s file').check()
  const file = longPairFile('pair.s2p', 10_001)
  const drop = page.getByLabel('Choose the two-port file')
  // The first file pays for the start of the worker.
  await drop.setInputFiles(file)
  await expect(live(page)).toContainText('±')
  await page.evaluate(() => performance.clearMeasures())
  await drop.setInputFiles({ ...file, name: 'again.s2p' })
  await expect(page.getByRole('button', { name: 'Take out again.s2p' })).toBeVisible()
  await expect.poll(() => measures(page)).toMatchObject({ 'engine:judge': expect.any(Number) })
  const took = await measures(page)
  await testInfo.attach('milliseconds', { body: JSON.stringify(took), contentType: 'application/json' })
  // A generous bound for a machine that runs other tests; the note of the issue says what it is on an idle one.
  expect(took['engine:read-file']! + took['engine:judge']!).toBeLessThan(2000)
})

function measures(page: Page): Promise<Record<string, number>> {
  return page.evaluate(() =>
    Object.fromEntries(performance.getEntriesByType('measure').map(({ name, duration }) => [name, duration])),
  )
}
