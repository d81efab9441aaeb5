import { expect, type Page } from '@playwright/test'
import { DEMO_SIGN_INS } from '../../../scripts/demo/sign-ins.ts'

type Person = (typeof DEMO_SIGN_INS)[number]['person']

function signInOf(person: Person): { address: string; password: string } {
  const signIn = DEMO_SIGN_INS.find((one) => one.person === person)
  if (!signIn) throw new Error(`${person} does not sign in to the demo group`)
  return signIn
}

/** Signs a person of the demo group in by the page, as they would. Starts from wherever the page has sent them. */
export async function enter(page: Page, person: Person): Promise<void> {
  const { address, password } = signInOf(person)
  await page.getByLabel('E-mail address').fill(address)
  await page.getByLabel('Password').fill(password)
  await page.getByRole('button', { name: 'Sign in' }).click()
  await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'))
}

/** Signs a person in without the sign-in page, which `enter` walks through. */
export async function signIn(page: Page, person: Person): Promise<void> {
  const { address, password } = signInOf(person)
  const reply = await page.request.post('/api/v1/sign-in', {
    data: { email: address, password },
    headers: { 'Sec-Fetch-Site': 'same-origin' },
  })
  expect(reply.status(), await reply.text()).toBe(200)
}

/** Opens a page as somebody who has signed in already. */
export async function openAs(page: Page, person: Person, path = '/'): Promise<void> {
  await signIn(page, person)
  await page.goto(path)
}
