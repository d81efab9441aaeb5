import { computed, onScopeDispose, toValue, type MaybeRefOrGetter } from 'vue'
import { readKitReadiness } from '#shared/contracts/kit-readiness.ts'
import { followLive } from '@/api/follow-live.ts'
import { useAnswer } from './useAnswer.ts'

/** One kit's readiness, read again by itself when somebody records something about it. */
export function useKitReadiness(kitId: MaybeRefOrGetter<string>, asOf: MaybeRefOrGetter<string | null>) {
  const call = computed(() => ({
    params: { kitId: toValue(kitId) },
    query: { asOf: toValue(asOf) ?? undefined },
  }))
  const { state, reload } = useAnswer(readKitReadiness, call)

  onScopeDispose(
    followLive({
      changed: ({ kitIds }) => {
        if (kitIds.length === 0 || kitIds.includes(toValue(kitId))) void reload()
      },
      connected: (again) => {
        if (again) void reload()
      },
      disconnected: () => undefined,
    }),
  )
  return { state, reload }
}
