let wanted = false

/**
 * Hands the focus to the page's heading after a navigation. The router asks for it; the heading claims it when it is
 * there, which may be after the data has come. The first page of a visit leaves the focus where the browser put it.
 */
export function useHeadingFocus() {
  return {
    request: () => void (wanted = true),
    claim(heading: HTMLElement | null): void {
      if (!wanted || !heading) return
      wanted = false
      heading.focus({ preventScroll: true })
    },
  }
}
