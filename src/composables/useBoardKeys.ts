import { onMounted, onUnmounted } from 'vue'

const STEPS: Readonly<Record<string, number>> = { j: 1, k: -1, ArrowDown: 1, ArrowUp: -1 }

/**
 * Keys of the board: down and up (or j and k) walk the rows, Enter opens one as any link, Home and End go to the ends,
 * "/" goes to the search. Arrows, Home and End scroll the page unless a row has the focus. Letters do nothing while
 * `letters` is off, so that nobody who speaks to the computer sets them off (WCAG 2.1.4).
 */
export function useBoardKeys(letters: () => boolean): void {
  function onKeydown(event: KeyboardEvent): void {
    if (event.defaultPrevented || event.altKey || event.ctrlKey || event.metaKey || isTyping(event.target))
      return
    if (event.key.length === 1 && !letters()) return
    const done = event.key === '/' ? toSearch() : walk(event.key)
    if (done) event.preventDefault()
  }
  onMounted(() => document.addEventListener('keydown', onKeydown))
  onUnmounted(() => document.removeEventListener('keydown', onKeydown))
}

function walk(key: string): boolean {
  const rows = [...document.querySelectorAll<HTMLElement>('table.board a.link')]
  const at = rows.indexOf(document.activeElement as HTMLElement)
  if (at < 0 && key !== 'j' && key !== 'k') return false
  const step = STEPS[key]
  const to = step === undefined ? { Home: 0, End: rows.length - 1 }[key] : Math.max(0, at + step)
  const row = to === undefined ? undefined : rows[Math.min(to, rows.length - 1)]
  row?.focus()
  return row !== undefined
}

/** On a narrow screen the search is folded away: it is opened first. */
function toSearch(): boolean {
  const bar = document.querySelector('.filter-bar')
  const search = bar?.querySelector<HTMLInputElement>('input[type="search"]')
  if (!search) return false
  if (search.offsetParent === null) bar?.querySelector<HTMLElement>('.fold')?.click()
  requestAnimationFrame(() => search.focus())
  return true
}

function isTyping(target: EventTarget | null): boolean {
  return (
    target instanceof HTMLElement &&
    (target.isContentEditable || /^(INPUT|SELECT|TEXTAREA)$/.test(target.tagName))
  )
}
