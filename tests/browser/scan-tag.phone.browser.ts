import type { Page } from '@playwright/test'
import { spokenTag } from '#shared/engine/tag-speech.ts'
import { enter, openAs, signIn } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

/** A tag in the hand of a volunteer: its code opens the thing, and so does its text however it was read. */

const heading = (page: Page) => page.getByRole('heading', { level: 1 })

async function tagOf(page: Page, designation: string): Promise<string> {
  const answer = await page.request.get(`/api/v1/items?search=${designation}`)
  const { rows } = (await answer.json()) as { rows: { tag: string }[] }
  return rows[0]!.tag
}

test('a scanned code opens the item, through the sign-in where nobody is signed in', async ({ page }) => {
  await openAs(page, 'lupe')
  const tag = await tagOf(page, 'XFM-07')
  await page.context().clearCookies()
  await page.goto(`/T/${tag}`)
  await enter(page, 'lupe')
  await expect(heading(page)).toHaveText('XFM-07')
  await expect(page).toHaveURL(/\/items\//)
  await expect(page.getByText(spokenTag(tag))).toBeVisible()
})

test('what is done to an item lies in the reach of a thumb', async ({ page }) => {
  await signIn(page, 'lupe')
  await page.goto(`/t/${(await tagOf(page, 'XFM-07')).toLowerCase()}`)
  for (const name of ['Record a test', 'Move']) {
    const box = await page.getByRole('button', { name }).boundingBox()
    expect(box!.height).toBeGreaterThanOrEqual(48)
    expect(box!.y).toBeGreaterThan(844 / 2)
    expect(box!.y + box!.height).toBeLessThan(844)
  }
  await page.getByRole('button', { name: 'Record a test' }).click()
  await page
    .getByRole('dialog')
    .getByRole('link', { name: /Heat test/ })
    .click()
  await expect(heading(page)).toContainText('Heat test of XFM-07')
})

test('a tag that was misread says what to do', async ({ page }) => {
  await openAs(page, 'lupe', '/t/XF3M9PP')
  await expect(page.getByText('This tag has a wrong or swapped character: read it again.')).toBeVisible()
  await page.goto('/t/XF3M9PM')
  await expect(heading(page)).toHaveText('Nothing here carries the tag XF3M9PM')
})

test('a tag read over the air finds the thing, and so does a designation', async ({ page }) => {
  await openAs(page, 'lupe', '/find')
  const search = page.getByRole('searchbox')
  await search.fill(spokenTag(await tagOf(page, 'XFM-07')))
  await expect(page.getByRole('link', { name: /XFM-07/ })).toContainText('carries this tag')
  await search.fill('bat-016')
  await expect(page.getByRole('link', { name: /BAT-016/ })).toContainText('in K-08')
  await page.getByRole('button', { name: 'Find' }).click()
  await expect(heading(page)).toHaveText('BAT-016')
})
