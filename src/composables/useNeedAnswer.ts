import { computed, onScopeDispose, shallowReadonly, shallowRef, watch } from 'vue'
import { answerNeed, type NeedAnswer } from '#shared/contracts/board-need.ts'
import type { QueryInputOf } from '#shared/contracts/endpoint.ts'
import { callApi } from '@/api/call-api.ts'

type Query = QueryInputOf<typeof answerNeed>

/**
 * The answer to what is needed, asked again at each revision of the board. `query` of null asks for nothing. The last
 * answer stays until the next has come; `waiting` says that it is the answer to another question.
 */
export function useNeedAnswer(query: () => Query | null, revision: () => number) {
  const shown = shallowRef<{ readonly key: string; readonly answer: NeedAnswer } | null>(null)
  const error = shallowRef<unknown>(null)
  let running = new AbortController()
  const key = computed(() => JSON.stringify(query()))

  async function load(): Promise<void> {
    running.abort()
    const mine = (running = new AbortController())
    const asked = query()
    if (!asked) {
      shown.value = null
      error.value = null
      return
    }
    try {
      const answer = await callApi(answerNeed, { query: asked, signal: mine.signal })
      if (mine.signal.aborted) return
      shown.value = { key: JSON.stringify(asked), answer }
      error.value = null
    } catch (thrown) {
      if (!mine.signal.aborted) error.value = thrown
    }
  }

  watch([key, revision], () => void load(), { immediate: true })
  onScopeDispose(() => running.abort())

  const waiting = computed(() => query() !== null && shown.value?.key !== key.value)
  return { shown: shallowReadonly(shown), error: shallowReadonly(error), waiting, load }
}
