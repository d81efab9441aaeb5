import { inject, onBeforeUnmount, provide, watch, type InjectionKey } from 'vue'
import type { DraftFaults } from '@/composables/useDraftFaults.ts'
import type { LimitWriter } from '@/format/issue.ts'

const KEY: InjectionKey<DraftFaults> = Symbol('form')

/** Called by the form: its fields find their faults by their paths. */
export function provideFaults(faults: DraftFaults): void {
  provide(KEY, faults)
}

/** Called by a field: its message, and what to call when it is left. Outside a form there are no faults. */
export function useFieldFault(path: () => string, limitText?: () => LimitWriter | undefined) {
  const faults = inject(KEY, null)
  watch(
    path,
    (now, before) => {
      if (before !== undefined) faults?.release(before)
      faults?.claim(now)
    },
    { immediate: true },
  )
  onBeforeUnmount(() => faults?.release(path()))
  return {
    message: () => faults?.message(path(), limitText?.()) ?? '',
    touch: () => faults?.touch(path()),
  }
}
