import { shallowReadonly, shallowRef } from 'vue'
import { checkOneTimeLink, useOneTimeLink as oneTimeLink } from '#shared/contracts/one-time-links.ts'
import type { ResponseOf } from '#shared/contracts/endpoint.ts'
import { callApi } from '@/api/call-api.ts'

type LinkFacts = ResponseOf<typeof checkOneTimeLink>

export type LinkState =
  | { readonly status: 'checking' }
  | { readonly status: 'invalid'; readonly error: unknown }
  | { readonly status: 'usable'; readonly facts: LinkFacts }
  | { readonly status: 'used'; readonly facts: LinkFacts }

/** A link from a mail: its secret stands behind `#`, where no server log sees it, and leaves the address at once. */
export function useMailedLink() {
  const state = shallowRef<LinkState>({ status: 'checking' })
  const token = window.location.hash.slice(1)
  window.history.replaceState(window.history.state, '', window.location.pathname)

  async function check(): Promise<void> {
    state.value = { status: 'checking' }
    try {
      const facts = await callApi(checkOneTimeLink, { body: { token } })
      state.value = { status: 'usable', facts }
    } catch (error) {
      state.value = { status: 'invalid', error }
    }
  }

  async function setPassword(newPassword: string): Promise<void> {
    if (state.value.status !== 'usable') return
    await callApi(oneTimeLink, { body: { token, newPassword } })
    state.value = { status: 'used', facts: state.value.facts }
  }

  void check()
  return { state: shallowReadonly(state), check, setPassword }
}
