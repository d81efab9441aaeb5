import { defineStore } from 'pinia'
import { shallowRef } from 'vue'
import { readSession, type SessionView } from '#shared/contracts/read-session.ts'
import type { signIn } from '#shared/contracts/session.ts'
import type { BodyInputOf } from '#shared/contracts/endpoint.ts'
import { callApi } from '@/api/call-api.ts'
import { takeEarly } from '@/api/early-answers.ts'
import { keep } from '@/device-storage.ts'

export type SignedInMember = NonNullable<SessionView['member']>

/** Left for `early.js`: somebody is signed in here, so the board is worth asking for before the application runs. */
const HINT = 'halyard.signed-in'

/** Who is signed in on this page. `undefined`: not asked yet; `null`: nobody. */
export const useSessionStore = defineStore('session', () => {
  const member = shallowRef<SignedInMember | null | undefined>(undefined)
  let loading: Promise<void> | undefined

  function take(view: SessionView): void {
    member.value = view.member
    remember(view.member !== null)
  }

  /** Asks once; a failure is asked anew by the next navigation and meanwhile counts as nobody. */
  function ensureLoaded(): Promise<void> {
    if (member.value !== undefined) return Promise.resolve()
    loading ??= reload().finally(() => (loading = undefined))
    return loading
  }

  async function reload(): Promise<void> {
    take(await callApi(readSession, { early: takeEarly('session', readSession.path) }))
  }

  async function enter(body: BodyInputOf<typeof signIn>): Promise<void> {
    const { signIn } = await import('#shared/contracts/session.ts')
    take(await callApi(signIn, { body }))
  }

  /** The whole page is loaded anew, so that nothing of this member stays in memory. */
  async function leave(everywhere = false): Promise<void> {
    const { signOut, signOutEverywhere } = await import('#shared/contracts/session.ts')
    await (everywhere ? callApi(signOutEverywhere, {}) : callApi(signOut, {}))
    remember(false)
    window.location.assign('/sign-in')
  }

  /** The service says that the session has ended. */
  function forget(): void {
    member.value = null
    remember(false)
  }

  return { member, take, ensureLoaded, reload, enter, leave, forget }
})

export type SessionStore = ReturnType<typeof useSessionStore>

function remember(signedIn: boolean): void {
  keep(HINT, signedIn ? '1' : null)
}
