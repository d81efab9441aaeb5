import { computed, ref, watch } from 'vue'
import { keep, readKeptJson } from '@/device-storage.ts'

interface Choosable {
  readonly key: string
  /** Shown until the member decides otherwise. */
  readonly shown?: boolean
}

/** Which columns of a list this device shows. The first column names the row and always stays. */
export function useColumnChoice(list: string, columns: readonly Choosable[]) {
  const storageKey = `halyard.columns.${list}`
  const usual = columns.filter(({ shown = true }) => shown).map(({ key }) => key)
  const chosen = ref(new Set(keptKeys(storageKey) ?? usual))
  watch(chosen, (keys) => keep(storageKey, JSON.stringify([...keys])))

  return {
    isShown: (key: string) => key === columns[0]?.key || chosen.value.has(key),
    isUsual: computed(() => sameKeys(chosen.value, usual)),
    toggle(key: string): void {
      const keys = new Set(chosen.value)
      if (!keys.delete(key)) keys.add(key)
      chosen.value = keys
    },
    reset: () => void (chosen.value = new Set(usual)),
  }
}

function sameKeys(chosen: ReadonlySet<string>, usual: readonly string[]): boolean {
  return chosen.size === usual.length && usual.every((key) => chosen.has(key))
}

function keptKeys(storageKey: string): string[] | null {
  const kept = readKeptJson(storageKey)
  return Array.isArray(kept) ? kept.filter((key) => typeof key === 'string') : null
}
