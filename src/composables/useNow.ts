import { readonly, ref } from 'vue'

const STEP_MS = 30_000

const now = ref(Date.now())
setInterval(() => {
  if (document.visibilityState === 'visible') now.value = Date.now()
}, STEP_MS)
document.addEventListener('visibilitychange', () => {
  if (document.visibilityState === 'visible') now.value = Date.now()
})

/** The device's clock in epoch milliseconds, moving every half minute while the page is seen; one timer for all. */
export function useNow() {
  return readonly(now)
}
