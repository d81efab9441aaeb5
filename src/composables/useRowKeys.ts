import { nextTick, watch, type Ref } from 'vue'
import { PAGE_ROWS, type RegistryList } from './useRegistryList.ts'

type Walkable = Pick<RegistryList<unknown>, 'rows' | 'page' | 'total' | 'turnTo'>

/**
 * Keys of a list: up and down walk the links of the rows, Home and End go to the first and the last, Page Up and Page
 * Down turn the page and land on its first row.
 */
export function useRowKeys(frame: Readonly<Ref<HTMLElement | null>>, list: () => Walkable) {
  let landing = false
  const links = () => [...(frame.value?.querySelectorAll<HTMLElement>('.row-link') ?? [])]

  watch(
    () => list().rows,
    async () => {
      if (!landing) return
      landing = false
      await nextTick()
      links()[0]?.focus()
    },
  )

  function onKeydown(event: KeyboardEvent): void {
    const all = links()
    const at = all.indexOf(document.activeElement as HTMLElement)
    if (at < 0 || event.altKey || event.ctrlKey || event.metaKey || event.shiftKey) return
    const to = { ArrowDown: at + 1, ArrowUp: at - 1, Home: 0, End: all.length - 1 }[event.key]
    if (to !== undefined) all[to]?.focus()
    else if (!turn(event.key)) return
    event.preventDefault()
  }

  function turn(key: string): boolean {
    const step = { PageDown: 1, PageUp: -1 }[key]
    if (step === undefined) return false
    const { page, total, turnTo } = list()
    const wanted = page + step
    if (wanted >= 1 && wanted <= Math.ceil(total / PAGE_ROWS)) {
      landing = true
      turnTo(wanted)
    }
    return true
  }

  return { onKeydown }
}
