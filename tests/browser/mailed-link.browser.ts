import type { Page } from '@playwright/test'
import { DEMO_SIGN_INS } from '../../scripts/demo/sign-ins.ts'
import type { Product } from './support/product.ts'
import { openAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

/** Links that arrive by mail: a new password, and the first one of somebody who was invited (promise P22). */

const PASSWORD = 'seven lamps over the harbor'

async function linkTo(product: Product, address: string): Promise<string> {
  const mail = await product.mail.waitForMail(({ deliveredTo }) => deliveredTo.includes(address))
  return /https?:\S+#\S+/.exec(mail.text)?.[0] ?? ''
}

async function choosePassword(page: Page, link: string): Promise<void> {
  await page.goto(link)
  await page.getByLabel('Password', { exact: true }).fill(PASSWORD)
  await page.getByRole('button', { name: 'Set the password' }).click()
  await expect(page.getByText('Your password is set')).toBeVisible()
  await page.getByRole('link', { name: 'Sign in' }).click()
}

async function signIn(page: Page, address: string): Promise<void> {
  await page.getByLabel('E-mail address').fill(address)
  await page.getByLabel('Password').fill(PASSWORD)
  await page.getByRole('button', { name: 'Sign in' }).click()
  await expect(page.getByRole('heading', { level: 1 })).toContainText('stations can go')
}

test('a forgotten password is set anew by a mailed link that works once', async ({ page, product }) => {
  const { address } = DEMO_SIGN_INS.find(({ person }) => person === 'dana')!
  await page.goto('/sign-in')
  await page.getByRole('link', { name: 'Forgot your password?' }).click()
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Forgot your password')
  await page.getByLabel('E-mail address').fill(address)
  await page.getByRole('button', { name: 'Send the link' }).click()
  await expect(page.getByText('a link is on its way')).toBeVisible()

  const link = await linkTo(product, address)
  await choosePassword(page, link)
  await signIn(page, address)
  await page.goto('about:blank')
  await page.goto(link)
  await expect(page.getByText('Links work once')).toBeVisible()
})

test('somebody who is invited chooses a password and sees the board', async ({ page, product }, {
  project,
}) => {
  const address = `new-${project.name}@example.org`
  await openAs(page, 'ines', '/people/new')
  await page.getByRole('textbox', { name: 'Name' }).fill('Nell Ashby')
  await page.getByRole('textbox', { name: 'E-mail' }).fill(address)
  await page.getByRole('checkbox', { name: /Volunteer/ }).check()
  await page.getByRole('button', { name: /Invite/ }).click()
  await expect(page.getByRole('heading', { level: 1 })).toContainText('Nell Ashby')

  await page.context().clearCookies()
  await choosePassword(page, await linkTo(product, address))
  await signIn(page, address)
})
