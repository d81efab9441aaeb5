import { computed, shallowRef, watch } from 'vue'
import type { NeedAnswer } from '#shared/contracts/board-need.ts'
import type { SectionLayout } from '@/format/board-layout.ts'
import { needLayout } from '@/format/need-layout.ts'

interface Placed {
  /** What was asked, and of which rows. */
  readonly key: string
  readonly layout: readonly SectionLayout[]
}

/**
 * Where the rows stand. While the same is asked they stay where they were first put, so that no row moves under a
 * finger; `sortAgain` puts them where the newest answer has them.
 */
export function useNeedLayout(
  board: () => readonly SectionLayout[],
  asked: () => { readonly key: string; readonly answer: NeedAnswer } | null,
) {
  const placed = shallowRef<Placed | null>(null)
  const fresh = computed<Placed | null>(() => {
    const now = asked()
    if (!now) return null
    const kitIds = board().flatMap((section) => section.kitIds)
    return { key: `${now.key} ${[...kitIds].sort().join()}`, layout: needLayout(board(), now.answer) }
  })

  function sortAgain(): void {
    placed.value = fresh.value
  }

  watch(
    fresh,
    (now) => {
      if (placed.value?.key !== now?.key) placed.value = now
    },
    { immediate: true },
  )

  const outOfOrder = computed(
    () => fresh.value !== null && JSON.stringify(placed.value) !== JSON.stringify(fresh.value),
  )
  return { layout: computed(() => placed.value?.layout ?? []), outOfOrder, sortAgain }
}
