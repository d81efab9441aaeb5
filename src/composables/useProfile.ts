import { ref, shallowReadonly, shallowRef } from 'vue'
import type { BodyOf, ResponseOf } from '#shared/contracts/endpoint.ts'
import { changeProfile, readProfile } from '#shared/contracts/profile.ts'
import { callApi } from '@/api/call-api.ts'
import { isProblem } from '@/api/problem-error.ts'
import { useSessionStore } from '@/stores/session.ts'
import { useProblem } from './useProblem.ts'

export type Profile = ResponseOf<typeof readProfile>
export type ProfileDraft = BodyOf<typeof changeProfile>

/** One's own record: read once, edited as a draft, saved against the version it was read at. */
export function useProfile() {
  const session = useSessionStore()
  const profile = shallowRef<Profile | null>(null)
  const draft = ref<ProfileDraft | null>(null)
  const theirs = shallowRef<Profile | null>(null)
  const status = ref<'loading' | 'ready' | 'saving' | 'saved'>('loading')
  const { error, field, run } = useProblem()

  async function load(): Promise<void> {
    status.value = 'loading'
    const read = await run(() => callApi(readProfile, {}))
    if (read) take(read)
    status.value = 'ready'
  }

  function take(read: Profile): void {
    profile.value = read
    draft.value = draftOf(read)
  }

  /** `over`: the version that the draft replaces, after the member saw both. */
  async function save(over?: Profile): Promise<void> {
    const base = over ?? profile.value
    if (!base || !draft.value) return
    status.value = 'saving'
    const body = emptyAsNull(draft.value)
    const saved = await run(() => callApi(changeProfile, { body, version: base.version }))
    theirs.value = isProblem(error.value, 'version-stale') ? (error.value.current as Profile) : null
    if (saved) {
      take(saved)
      await session.reload()
    }
    status.value = saved ? 'saved' : 'ready'
  }

  void load()
  return { profile: shallowReadonly(profile), draft, theirs, status, error, field, load, take, save }
}

function draftOf(read: Profile): ProfileDraft {
  const {
    name,
    phone,
    callSign,
    licenceClass,
    licenceExpiresOn,
    temperatureUnit,
    lengthUnit,
    wantsReminders,
  } = read
  return {
    name,
    phone,
    callSign,
    licenceClass,
    licenceExpiresOn,
    temperatureUnit,
    lengthUnit,
    wantsReminders,
  }
}

/** An emptied field means "none". */
function emptyAsNull(draft: ProfileDraft): ProfileDraft {
  const none = (text: string | null) => (text?.trim() ? text : null)
  return {
    ...draft,
    phone: none(draft.phone),
    callSign: none(draft.callSign),
    licenceClass: none(draft.licenceClass),
    licenceExpiresOn: none(draft.licenceExpiresOn),
  }
}
