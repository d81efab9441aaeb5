import { ref, shallowRef } from 'vue'
import type { BodyOf, ResponseOf } from '#shared/contracts/endpoint.ts'
import { getKit, setKitAvailability } from '#shared/contracts/kits.ts'
import { callApi } from '@/api/call-api.ts'
import { isProblem } from '@/api/problem-error.ts'
import { useProblem } from './useProblem.ts'

export type KitRecord = ResponseOf<typeof getKit>
export type AvailabilityDraft = BodyOf<typeof setKitAvailability>

/** Whether a kit may go, edited against the version that was read. `theirs` is set when somebody was faster. */
export function useKitAvailability(kitId: string) {
  const record = shallowRef<KitRecord | null>(null)
  const draft = ref<AvailabilityDraft | null>(null)
  const theirs = shallowRef<KitRecord | null>(null)
  const busy = ref(false)
  const { error, field, run } = useProblem()

  async function load(): Promise<void> {
    const read = await run(() => callApi(getKit, { params: { kitId } }))
    if (read) take(read)
  }

  function take(read: KitRecord): void {
    record.value = read
    draft.value = draftOf(read)
  }

  /** True when it was stored. `over`: the record that the draft replaces, after the member saw both. */
  async function save(over?: KitRecord): Promise<boolean> {
    const base = over ?? record.value
    if (!base || !draft.value) return false
    busy.value = true
    const body = fitting(draft.value)
    const saved = await run(() =>
      callApi(setKitAvailability, { params: { kitId }, body, version: base.version }),
    )
    theirs.value = isProblem(error.value, 'version-stale') ? (error.value.current as KitRecord) : null
    busy.value = false
    return saved !== undefined
  }

  void load()
  return { draft, theirs, busy, error, field, load, take, save }
}

export function draftOf(record: KitRecord): AvailabilityDraft {
  return {
    availability: record.availability,
    reason: record.availabilityReason,
    expectedReturnOn: record.expectedReturnOn,
    holderId: record.holder?.id ?? null,
  }
}

/** Only what the chosen word takes: an available kit has no return, only an assigned one a holder. */
function fitting({ availability, reason, expectedReturnOn, holderId }: AvailabilityDraft): AvailabilityDraft {
  return {
    availability,
    reason: availability === 'available' ? '' : reason,
    expectedReturnOn: availability === 'available' ? null : expectedReturnOn || null,
    holderId: availability === 'assigned' ? holderId || null : null,
  }
}
