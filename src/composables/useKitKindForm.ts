import { computed } from 'vue'
import type { ResponseOf } from '#shared/contracts/endpoint.ts'
import { createKitKind, getKitKind, kitKindBody, updateKitKind } from '#shared/contracts/kit-kinds.ts'
import type { Band, Category, Mode } from '#shared/engine/vocabulary.ts'
import { callApi } from '@/api/call-api.ts'
import { uuidv7 } from '@/api/new-id.ts'
import { conflictsOf } from '@/format/conflicts.ts'
import { withoutBlanks } from '@/format/item-details.ts'
import { describeKitKind } from '@/format/kit-kind-draft.ts'
import { useRecordForm } from './useRecordForm.ts'

type Stored = ResponseOf<typeof getKitKind>
type Typed = number | string | null

/** One position of the load plan as it is typed. */
export interface PositionDraft {
  readonly id: string
  name: string
  category: Category | null
  quantity: Typed
  vital: boolean
  requires: { connector?: string; minA?: Typed; minWatts?: Typed; minAh?: Typed; note?: string }
}

export interface KitKindDraft {
  code: string
  name: string
  station: boolean
  promise: { bands: Band[]; modes: Mode[]; watts: Typed; hours: Typed; transmitPercent?: Typed | undefined }
  positions: PositionDraft[]
}

export function newPosition(): PositionDraft {
  return { id: uuidv7(), name: '', category: null, quantity: 1, vital: true, requires: {} }
}

export function useKitKindForm(kitKindId: string | null) {
  const form = useRecordForm({
    name: 'kit-kind',
    id: kitKindId,
    blank: (): KitKindDraft => ({
      code: '',
      name: '',
      station: true,
      promise: { bands: [], modes: ['voice'], watts: null, hours: null },
      positions: [],
    }),
    draftOf: ({ code, name, station, promise, positions }: Stored): KitKindDraft => ({
      code,
      name,
      station,
      promise: { ...promise, bands: [...promise.bands], modes: [...promise.modes] },
      positions: positions.map((position) => ({ ...position, requires: { ...position.requires } })),
    }),
    check: (draft) => kitKindBody.safeParse(bodyOf(draft)),
    read: (id) => callApi(getKitKind, { params: { kitKindId: id } }),
    create: (id, body) => callApi(createKitKind, { params: { kitKindId: id }, body }),
    update: (id, body, version) => callApi(updateKitKind, { params: { kitKindId: id }, body, version }),
  })
  const conflicts = computed(() =>
    form.theirs ? conflictsOf(describeKitKind(form.draft), describeKitKind(form.draftOf(form.theirs))) : [],
  )
  return { form, conflicts }
}

function bodyOf(draft: KitKindDraft): unknown {
  return {
    ...draft,
    positions: draft.positions.map((position) => ({
      ...position,
      requires: withoutBlanks(position.requires),
    })),
  }
}
