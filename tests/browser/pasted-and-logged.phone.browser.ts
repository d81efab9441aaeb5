import type { Page } from '@playwright/test'
import { idOfItem } from './support/items.ts'
import { openAs } from './support/sign-in.ts'
import { expect, test, type Product } from './support/test.ts'

/** Readings that come out of a spreadsheet or a thermometer instead of a thumb. */

async function openForm(page: Page, product: Product, designation: string, procedure: string): Promise<void> {
  await openAs(page, 'lupe', `/items/${await idOfItem(product, designation)}/tests/new/${procedure}`)
  await expect(page.getByRole('heading', { level: 1 })).toContainText(designation)
}

const live = (page: Page) => page.getByRole('region', { name: 'As it will be judged' })

async function paste(page: Page, label: string, text: string): Promise<void> {
  await page.getByLabel(label).first().focus()
  await page.evaluate((pasted) => {
    const clipboardData = new DataTransfer()
    clipboardData.setData('text/plain', pasted)
    const event = new ClipboardEvent('paste', { clipboardData, bubbles: true, cancelable: true })
    document.activeElement?.dispatchEvent(event)
  }, text)
}

test('a pasted column fills the rows below with figures to judge, and can be taken back', async ({
  page,
  product,
}) => {
  await openForm(page, product, 'ANT-02', 'antenna-sweep')
  await paste(page, 'Frequency, MHz', '7,1\t1,4\n14,2\t1,5\n21,2\t9')
  await expect(page.getByText('3 lines pasted.')).toBeVisible()
  await expect(page.getByLabel('SWR', { exact: true }).nth(1)).toHaveValue('1.5')
  await expect(live(page)).toContainText('Fail')
  await page.getByRole('button', { name: 'Take the paste back' }).click()
  await expect(page.getByLabel('SWR', { exact: true }).nth(1)).toHaveValue('')
})

test('a cell that cannot be read is named by row and column, and nothing changes', async ({
  page,
  product,
}) => {
  await openForm(page, product, 'FDL-02', 'feedline-loss')
  await page.getByLabel('Loss, dB').first().fill('0.7')
  await paste(page, 'Loss, dB', '0,8 dB\nopen')
  await expect(page.getByRole('alert')).toContainText('Row 2, Loss: “open” is not a number')
  await expect(page.getByLabel('Loss, dB').first()).toHaveValue('0.7')
})

/** Set A of the calculation sheet, section 6. */
const LOGGED = [
  21.7, 31.8, 39.9, 46.7, 52.7, 57.8, 61.7, 64.8, 67.3, 69.8, 71.5, 72.5, 73.5, 74.7, 75.5, 76.5,
]

test('a thermometer’s log becomes a heat test, its unit asked for and a photo kept with it', async ({
  page,
  product,
}) => {
  await openForm(page, product, 'XFM-04', 'heat-test')
  await page.getByLabel('Air around it').fill('21.5')
  await page.getByText('The test was logged by a thermometer').click()
  const log = `Time (s),Temp\n${LOGGED.map((celsius, minute) => `${minute * 60},${celsius}`).join('\n')}`
  await page
    .getByLabel('Choose the CSV file')
    .setInputFiles({ name: 'log.csv', mimeType: 'text/csv', buffer: Buffer.from(log) })
  await page.getByLabel('°C', { exact: true }).check()
  await expect(page.getByText('16 readings, over 15')).toBeVisible()
  await page.getByRole('button', { name: 'Take these readings over' }).click()
  await expect(live(page)).toContainText('76.5')

  await page.getByText(/Photos and certificates/).click()
  await page
    .getByLabel('Take a photo')
    .setInputFiles({ name: 'core.png', mimeType: 'image/png', buffer: await page.screenshot() })
  await page.getByRole('button', { name: 'Record the test' }).click()
  await expect(page.getByText('Recorded for XFM-04.')).toBeVisible()
  const answer = await page.request.get(`/api/v1/tests?itemId=${await idOfItem(product, 'XFM-04')}&size=1`)
  const [{ id }] = (await answer.json()).rows as [{ id: string }]
  const stored = await (await page.request.get(`/api/v1/tests/${id}`)).json()
  expect(stored.attachments.map(({ kind }: { kind: string }) => kind).sort()).toEqual(['csv', 'photo'])
})

test('a log that is too short to say is shown as just that, before and after the key is up', async ({
  page,
  product,
}) => {
  await page.clock.install({ time: new Date(Date.now() - 20 * 60_000) })
  await openForm(page, product, 'XFM-05', 'heat-test')
  await page.getByLabel('Air around it').fill('23')
  await page.getByLabel('I have read the cautions').check()
  await page.getByRole('button', { name: 'Key down now' }).click()
  for (const celsius of ['23', '26', '29']) {
    await page.getByRole('textbox', { name: /^Reading at|^One more reading/ }).fill(celsius)
    await page.getByRole('button', { name: 'Enter the reading' }).click()
    await page.clock.fastForward(60_000)
  }
  const outlook = page.getByRole('region', { name: 'Where it is heading' })
  await expect(outlook).toContainText('too short to say where the temperature ends')
  await expect(outlook).toContainText('at the earliest, if at all')
  await expect(outlook).not.toContainText('Heading for')
})
