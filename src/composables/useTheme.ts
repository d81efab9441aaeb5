import { readonly, ref } from 'vue'
import { keep } from '@/device-storage.ts'

export type Theme = 'day' | 'night'

const KEY = 'halyard.theme'
const PAPER: Record<Theme, string> = { day: '#f3eee2', night: '#070503' }

const theme = ref<Theme>(document.documentElement.dataset.theme === 'night' ? 'night' : 'day')

/** Day or night, chosen per device and remembered; `early.js` sets it before the first paint. */
export function useTheme() {
  function choose(wanted: Theme): void {
    theme.value = wanted
    document.documentElement.dataset.theme = wanted
    document.querySelector('meta[name="theme-color"]')?.setAttribute('content', PAPER[wanted])
    keep(KEY, wanted)
  }

  return { theme: readonly(theme), choose, toggle: () => choose(theme.value === 'day' ? 'night' : 'day') }
}
