import { ref } from 'vue'
import { useProblem } from './useProblem.ts'

/** What can be taken out of use with a reason and brought back. */
export interface Retirable {
  readonly version: number
  readonly retiredAt: string | null
  readonly retiredReason: string | null
}

/** How one kind of record is retired and brought back, at the version that is on the screen. */
export interface Retirement<Stored extends Retirable> {
  retire(reason: string, version: number): Promise<Stored>
  bringBack(version: number): Promise<Stored>
}

export function useRetirement<Stored extends Retirable>(
  calls: Retirement<Stored>,
  changed: (stored: Stored) => void,
) {
  const busy = ref(false)
  const { error, field, run, clear } = useProblem()

  /** True when it is done. */
  async function settle(work: () => Promise<Stored>): Promise<boolean> {
    busy.value = true
    const stored = await run(work)
    busy.value = false
    if (stored) changed(stored)
    return stored !== undefined
  }

  return {
    busy,
    error,
    field,
    clear,
    retire: (reason: string, version: number) => settle(() => calls.retire(reason, version)),
    bringBack: (version: number) => settle(() => calls.bringBack(version)),
  }
}
