import { computed } from 'vue'
import type { ResponseOf } from '#shared/contracts/endpoint.ts'
import { createItem, getItem, itemBody, newItemBody, updateItem } from '#shared/contracts/items.ts'
import type { Accountability, Category, Condition } from '#shared/engine/vocabulary.ts'
import { callApi } from '@/api/call-api.ts'
import { conflictsOf } from '@/format/conflicts.ts'
import { describeItem } from '@/format/item-draft.ts'
import { detailsBody } from '@/format/item-details.ts'
import { useRecordForm } from './useRecordForm.ts'
import { useUnits } from './useUnits.ts'

type Stored = ResponseOf<typeof getItem>

/** An item as it is typed. Details keep what was typed for another category, so that choosing again loses nothing. */
export interface ItemDraft {
  designation: string
  details: DetailsDraft
  maker: string
  model: string
  serial: string | null
  accountability: Accountability
  condition: Condition
  conditionReason: string
  ownerId: string | null
  buildSheetId: string | null
  batchId: string | null
  acquiredOn: string | null
  weightKg: number | string | null
  notes: string
  placeId: string | null
}

export type DetailsDraft = { category: Category | null } & Record<string, unknown>

const BLANK: Omit<ItemDraft, 'details'> = {
  designation: '',
  maker: '',
  model: '',
  serial: null,
  accountability: 'durable',
  condition: 'serviceable',
  conditionReason: '',
  ownerId: null,
  buildSheetId: null,
  batchId: null,
  acquiredOn: null,
  weightKg: null,
  notes: '',
  placeId: null,
}

export function useItemForm(itemId: string | null) {
  const { text } = useUnits()
  const form = useRecordForm({
    name: 'item',
    id: itemId,
    blank: (): ItemDraft => ({ ...BLANK, details: { category: null } }),
    draftOf,
    check: (draft) => newItemBody.safeParse(bodyOf(draft)),
    read: (id) => callApi(getItem, { params: { itemId: id } }),
    create: (id, body) => callApi(createItem, { params: { itemId: id }, body }),
    update: (id, body, version) =>
      callApi(updateItem, { params: { itemId: id }, body: withoutPlace(body), version }),
  })
  const conflicts = computed(() =>
    form.theirs
      ? conflictsOf(describeItem(form.draft, text), describeItem(form.draftOf(form.theirs), text))
      : [],
  )
  return { form, conflicts }
}

function draftOf(stored: Stored): ItemDraft {
  return {
    designation: stored.designation,
    details: { ...stored.details },
    maker: stored.maker,
    model: stored.model,
    serial: stored.serial,
    accountability: stored.accountability,
    condition: stored.condition,
    conditionReason: stored.conditionReason,
    ownerId: stored.owner?.id ?? null,
    // The sheet of a batch comes with the batch.
    buildSheetId: stored.batch ? null : (stored.buildSheet?.id ?? null),
    batchId: stored.batch?.id ?? null,
    acquiredOn: stored.acquiredOn,
    weightKg: stored.weightKg,
    notes: stored.notes,
    placeId: stored.place?.id ?? null,
  }
}

function bodyOf(draft: ItemDraft): unknown {
  return {
    ...draft,
    conditionReason: draft.condition === 'serviceable' ? '' : draft.conditionReason,
    details: detailsBody(draft.details),
  }
}

function withoutPlace({ placeId: _placeId, ...body }: ReturnType<typeof newItemBody.parse>) {
  return itemBody.parse(body)
}
