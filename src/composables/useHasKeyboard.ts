import { onScopeDispose, readonly, shallowRef } from 'vue'

/** Whether keys are worth helping with: beside a mouse there is a keyboard; on a phone once a key was pressed. */
export function useHasKeyboard() {
  const has = shallowRef(matchMedia('(any-pointer: fine)').matches)
  if (!has.value) {
    const notice = () => void (has.value = true)
    window.addEventListener('keydown', notice, { once: true })
    onScopeDispose(() => window.removeEventListener('keydown', notice))
  }
  return readonly(has)
}
