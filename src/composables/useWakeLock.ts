import { onScopeDispose, toValue, watch, type MaybeRefOrGetter } from 'vue'

/** Keeps the screen on while `wanted`, where the browser allows; a lock lost to a hidden page is asked for again. */
export function useWakeLock(wanted: MaybeRefOrGetter<boolean>): void {
  let lock: WakeLockSentinel | null = null

  async function hold(): Promise<void> {
    if (!toValue(wanted) || document.visibilityState !== 'visible' || !('wakeLock' in navigator)) return
    try {
      lock = await navigator.wakeLock.request('screen')
    } catch {
      // Low battery or a refusal: times are instants, so a sleeping screen loses nothing.
    }
  }

  async function release(): Promise<void> {
    await lock?.release()
    lock = null
  }

  watch(
    () => toValue(wanted),
    (on) => void (on ? hold() : release()),
    { immediate: true },
  )
  document.addEventListener('visibilitychange', hold)
  onScopeDispose(() => {
    document.removeEventListener('visibilitychange', hold)
    void release()
  })
}
