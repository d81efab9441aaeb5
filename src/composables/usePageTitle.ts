import { watchEffect } from 'vue'

export function setPageTitle(title: string): void {
  document.title = title === '' ? 'Halyard' : `${title} · Halyard`
}

/** The window's title for a page that is about one thing: `usePageTitle(() => kit.value?.designation)`. */
export function usePageTitle(title: () => string | undefined): void {
  watchEffect(() => {
    const text = title()
    if (text) setPageTitle(text)
  })
}
