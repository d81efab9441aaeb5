import { onScopeDispose, shallowReadonly, shallowRef, toValue, watch, type MaybeRefOrGetter } from 'vue'
import type { Endpoint, ResponseOf } from '#shared/contracts/endpoint.ts'
import { callApi, type Call } from '@/api/call-api.ts'

/** What a page has of an answer. `stale` says why what is shown could not be read again. */
export type AnswerState<Answer> =
  | { readonly status: 'loading' }
  | { readonly status: 'failed'; readonly error: unknown }
  | { readonly status: 'shown'; readonly answer: Answer; readonly stale: unknown }

/**
 * One answer of the service for a page, read when the page opens and again when the call changes or `reload` is
 * called; meanwhile the last answer stays. For `light` pages, which do without the query cache; a call of `null`
 * waits.
 */
export function useAnswer<E extends Endpoint>(endpoint: E, call: MaybeRefOrGetter<Call<E> | null>) {
  const state = shallowRef<AnswerState<ResponseOf<E>>>({ status: 'loading' })
  let running = new AbortController()

  async function reload(): Promise<void> {
    const wanted = toValue(call)
    if (!wanted) return
    running.abort()
    const mine = (running = new AbortController())
    try {
      const answer = await callApi(endpoint, { ...wanted, signal: mine.signal })
      if (!mine.signal.aborted) state.value = { status: 'shown', answer, stale: null }
    } catch (error) {
      if (!mine.signal.aborted) fail(error)
    }
  }

  function fail(error: unknown): void {
    state.value =
      state.value.status === 'shown' ? { ...state.value, stale: error } : { status: 'failed', error }
  }

  watch(
    () => JSON.stringify(toValue(call)),
    () => void reload(),
    { immediate: true },
  )
  onScopeDispose(() => running.abort())

  return {
    state: shallowReadonly(state),
    reload,
    /** Puts an answer in place that another call brought, such as the record after a change. */
    show: (answer: ResponseOf<E>) => void (state.value = { status: 'shown', answer, stale: null }),
  }
}
