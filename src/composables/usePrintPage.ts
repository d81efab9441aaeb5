import { onScopeDispose, toValue, watchEffect, type MaybeRefOrGetter } from 'vue'

/**
 * Prints this page on paper of its own size, without the frame of the application, as long as the page is open. A rule
 * of the document and not a named page: what stands before a named page would be printed on a sheet of its own.
 */
export function usePrintPage(size: MaybeRefOrGetter<string>): void {
  const style = document.createElement('style')
  document.head.append(style)
  watchEffect(() => {
    style.textContent = `@page { size: ${toValue(size)}; margin: 8mm }
      @media print { header:has(+ main) { display: none !important } main { padding: 0 !important } }`
  })
  onScopeDispose(() => style.remove())
}
