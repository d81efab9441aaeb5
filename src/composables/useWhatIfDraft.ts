import { ref, watch, type Ref } from 'vue'
import type { WhatIfStepBody } from '#shared/contracts/what-if.ts'
import { useKeptDraft } from './useKeptDraft.ts'

/** The changes that somebody has in mind, kept in this tab until they are done or thrown away. */
export function useWhatIfDraft(): Ref<WhatIfStepBody[]> {
  const kept = useKeptDraft<WhatIfStepBody[]>('what-if')
  const steps = ref(kept.read() ?? [])
  watch(steps, (now) => (now.length > 0 ? kept.keep(now) : kept.forget()), { deep: true })
  return steps
}
