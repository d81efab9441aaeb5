import { readonly, shallowRef } from 'vue'

interface Pending {
  readonly answer: Promise<boolean>
  readonly settle: (given: boolean) => void
}

const pending = shallowRef<Pending | null>(null)

/**
 * One question at a time: calls that need the password while the dialog is open wait for the same answer. `ask`
 * resolves to true once the service has taken the password, to false when the member gave up.
 */
export function usePasswordPrompt() {
  function ask(): Promise<boolean> {
    if (pending.value) return pending.value.answer
    let settle: (given: boolean) => void = () => undefined
    const answer = new Promise<boolean>((resolve) => {
      settle = resolve
    })
    pending.value = { answer, settle }
    return answer
  }

  function finish(given: boolean): void {
    pending.value?.settle(given)
    pending.value = null
  }

  return { pending: readonly(pending), ask, finish }
}
