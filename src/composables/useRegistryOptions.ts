import { computed, shallowRef, watch } from 'vue'
import type { ResponseOf } from '#shared/contracts/endpoint.ts'
import type { getRegistryOptions } from '#shared/contracts/registry-options.ts'
import { CREW } from '#shared/contracts/roles.ts'
import { callApi } from '@/api/call-api.ts'
import { isAllowed } from '@/navigation.ts'
import { useSessionStore } from '@/stores/session.ts'

export type RegistryOptions = ResponseOf<typeof getRegistryOptions>

const FRESH_MS = 60_000

let kept: { readonly memberId: string; readonly options: RegistryOptions; readonly atMs: number } | undefined

/**
 * The short lists that forms and filters choose from: kinds with their positions, places, build sheets, batches,
 * members. Crew only; `null` until they are there. Kept for a minute, since many screens ask. Nothing is loaded before
 * it is `wanted`.
 */
export function useRegistryOptions(wanted: () => boolean = () => true) {
  const member = useSessionStore().member
  const options = shallowRef<RegistryOptions | null>(null)
  const error = shallowRef<unknown>(null)

  async function load(): Promise<void> {
    if (!member || !isAllowed(CREW, member.heldRoles)) return
    error.value = null
    try {
      options.value = await optionsOf(member.id)
    } catch (thrown) {
      error.value = thrown
    }
  }

  watch(wanted, (now) => void (now && load()), { immediate: true })
  return { options: computed(() => options.value), error, reload: load }
}

async function optionsOf(memberId: string): Promise<RegistryOptions> {
  if (kept?.memberId === memberId && Date.now() - kept.atMs < FRESH_MS) return kept.options
  // Loaded when wanted: the contract of every item's fields is no part of the first screen.
  const { getRegistryOptions } = await import('#shared/contracts/registry-options.ts')
  const options = await callApi(getRegistryOptions, {})
  kept = { memberId, options, atMs: Date.now() }
  return options
}
