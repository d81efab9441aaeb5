import type { Page } from '@playwright/test'
import { violationsByTheme } from './support/axe.ts'
import { signIn } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

interface Rows {
  rows: { id: string; procedure: string; finding: string }[]
}

async function read<Answer>(page: Page, path: string): Promise<Answer> {
  return (await (await page.request.get(path)).json()) as Answer
}

async function itemId(page: Page, designation: string): Promise<string> {
  const { rows } = await read<Rows>(page, `/api/v1/items?search=${designation}`)
  return rows[0]!.id
}

/** The newest test of an item by a procedure, or its newest that failed. */
async function testPath(page: Page, designation: string, procedure: string, finding = ''): Promise<string> {
  const of = await itemId(page, designation)
  const query = `itemId=${of}&procedure=${procedure}${finding === '' ? '' : `&finding=${finding}`}`
  const { rows } = await read<Rows>(page, `/api/v1/tests?${query}`)
  return `/tests/${rows[0]!.id}`
}

/** Everything that can be opened is open, so that axe and the width see all of it. */
async function openAll(page: Page): Promise<void> {
  await page.evaluate(() => {
    for (const details of document.querySelectorAll('details')) details.open = true
  })
  await expect(page.locator('[aria-busy="true"]')).toHaveCount(0)
}

async function expectWhole(page: Page): Promise<void> {
  await openAll(page)
  expect(await violationsByTheme(page)).toEqual([])
  const wider = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)
  expect(wider).toBeLessThanOrEqual(0)
}

/** Numbers keep their unit by an unbreakable space, which a pattern must take for one. */
const words = (text: string) => new RegExp(text.replaceAll(' ', '\\s'))

const TESTS = [
  ['XFM-07', 'heat-test', 'fail', 'It reached 85 °C after 8\\.\\d min at 50 W on 10 m'],
  ['XFM-07', 'pair-loss', 'fail', '10 m fails: 74 % comes through where at least 80 % is asked'],
  ['FDL-20', 'feedline-loss', 'fail', '2 m fails: the line takes 3\\.1 dB, 1\\.7 dB more than its baseline'],
  ['ANT-07', 'antenna-sweep', 'fail', '40 m fails: SWR 3 at 7\\.2 MHz where at most 2\\.5 is allowed'],
  ['BAT-013', 'battery-capacity', 'fail', '79 % of its rating'],
] as const

const ITEMS = [
  ['FDL-20', '1\\.4 dB to 3\\.1 dB while the SWR at the radio fell from 1\\.52 to 1\\.33'],
  ['ANT-15', 'SWR on '],
  ['BAT-013', 'Capacity: 88 % on .*, 79 % on .*at least 80 % is asked: it fails'],
  ['XFM-07', 'Efficiency on 10 m: '],
] as const

for (const [designation, procedure, finding, answer] of TESTS)
  test(`the picture of a ${procedure} of ${designation} says its answer, and axe finds nothing by day and night`, async ({
    page,
  }) => {
    await signIn(page, 'tobin')
    await page.goto(await testPath(page, designation, procedure, finding))
    await expect(page.locator('figure figcaption')).toContainText(words(answer))
    await expect(page.locator('figure svg[role="img"]')).toBeVisible()
    await expectWhole(page)
  })

for (const [designation, answer] of ITEMS)
  test(`the pictures of ${designation} over the years say their answers, and axe finds nothing by day and night`, async ({
    page,
  }) => {
    await signIn(page, 'tobin')
    await page.goto(`/items/${await itemId(page, designation)}`)
    await expect(page.locator('figure figcaption').first()).toContainText(words(answer))
    await expectWhole(page)
  })

test('how a figure was made is a tap away: arithmetic, rule, engine and the calibration of that day', async ({
  page,
}) => {
  await signIn(page, 'lupe')
  await page.goto(await testPath(page, 'XFM-07', 'pair-loss', 'fail'))
  await page.getByText('How this was made').click()
  await expect(page.getByText('10 log (50 / 27.38) = 2.62 dB for both, 1.31 dB for one')).toBeVisible()
  await expect(page.getByText('Calculation sheet, sections 3 and 5')).toBeVisible()
  await expect(page.getByText(/engine version \d/)).toBeVisible()
  await expect(page.getByText(/In date that day|Shown to be right|Lapsed that day/)).toBeVisible()
})

test('the numbers of a picture lead to their tests', async ({ page }) => {
  await signIn(page, 'lupe')
  await page.goto(`/items/${await itemId(page, 'FDL-20')}`)
  await page.getByText('The same numbers as a table').click()
  await page.getByRole('group', { name: 'The numbers of the picture' }).getByRole('link').first().click()
  await expect(page.getByRole('heading', { level: 1 })).toContainText('Feedline loss of FDL-20')
})
