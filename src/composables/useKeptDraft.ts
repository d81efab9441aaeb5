import { useSessionStore } from '@/stores/session.ts'

/**
 * What a form holds until it is saved, kept in this tab: a reload, a sign-in in between or a tap on the wrong link
 * loses nothing that was typed. Another member who signs in here does not see it.
 */
export function useKeptDraft<Kept>(name: string) {
  const storageKey = `halyard.draft.${useSessionStore().member?.id ?? ''}.${name}`

  return {
    read(): Kept | null {
      try {
        return JSON.parse(sessionStorage.getItem(storageKey) ?? 'null') as Kept | null
      } catch {
        return null
      }
    },
    keep(value: Kept): void {
      try {
        sessionStorage.setItem(storageKey, JSON.stringify(value))
      } catch {
        // Storage that is full or refused: the form itself still holds everything.
      }
    },
    forget: () => sessionStorage.removeItem(storageKey),
  }
}
