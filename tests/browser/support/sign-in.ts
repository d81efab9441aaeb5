import type { Page } from '@playwright/test'
import { DEMO_SIGN_INS } from '../../../scripts/demo/sign-ins.ts'

type Person = (typeof DEMO_SIGN_INS)[number]['person']

/** Signs a person of the demo group in by the page, as they would. Starts from wherever the page has sent them. */
export async function enter(page: Page, person: Person): Promise<void> {
  const signIn = DEMO_SIGN_INS.find((one) => one.person === person)
  if (!signIn) throw new Error(`${person} does not sign in to the demo group`)
  await page.getByLabel('E-mail address').fill(signIn.address)
  await page.getByLabel('Password').fill(signIn.password)
  await page.getByRole('button', { name: 'Sign in' }).click()
  await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'))
}

export async function openAs(page: Page, person: Person, path = '/'): Promise<void> {
  await page.goto(path)
  await enter(page, person)
}
