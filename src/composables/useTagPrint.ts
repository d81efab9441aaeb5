import { computed, reactive, ref, shallowRef, watch } from 'vue'
import type { BodyInputOf, ResponseOf } from '#shared/contracts/endpoint.ts'
import { countUnprintedTags, printTagSheet } from '#shared/contracts/tag-sheets.ts'
import { cellsPerSheet, TAG_SHEETS } from '#shared/engine/tag-layout.ts'
import { callApi, callForFile } from '@/api/call-api.ts'
import { saveFile } from '@/format/save-file.ts'
import { formatBody, readFormat, keepFormat, type TagFormat } from '@/format/tag-format.ts'
import { useProblem } from './useProblem.ts'

type Body = BodyInputOf<typeof printTagSheet>

/** A kit or an item whose tag was chosen for print. */
export interface ChosenThing {
  readonly id: string
  readonly designation: string
}

/** What is to be printed and on what; the format is remembered on this device. */
export function useTagPrint() {
  const which = ref<'unprinted' | 'chosen'>('unprinted')
  const of = ref<'all' | 'kits' | 'items'>('all')
  const kits = ref(new Map<string, ChosenThing>())
  const items = ref(new Map<string, ChosenThing>())
  const format = reactive<TagFormat>(readFormat())
  const unprinted = shallowRef<ResponseOf<typeof countUnprintedTags> | null>(null)
  const printed = ref(0)
  const busy = ref(false)
  const { error, field, run } = useProblem()
  watch(format, keepFormat)

  const labels = computed(() => {
    if (which.value === 'chosen') return kits.value.size + items.value.size
    const counts = unprinted.value ?? { kits: 0, items: 0 }
    return (of.value === 'items' ? 0 : counts.kits) + (of.value === 'kits' ? 0 : counts.items)
  })

  const selection = (): Body['selection'] =>
    which.value === 'unprinted'
      ? { kind: 'unprinted', of: of.value }
      : { kind: 'chosen', kitIds: [...kits.value.keys()], itemIds: [...items.value.keys()] }

  async function print(): Promise<void> {
    busy.value = true
    const count = labels.value
    const body = { selection: selection(), format: formatBody(format) }
    const file = await run(() => callForFile(printTagSheet, { body }))
    busy.value = false
    if (!file) return
    saveFile(file, 'tags.pdf')
    printed.value = count
    format.startCell = nextFreeCell(format, count)
    kits.value = new Map()
    items.value = new Map()
    await countAnew()
  }

  async function countAnew(): Promise<void> {
    unprinted.value = await callApi(countUnprintedTags, {}).catch(() => null)
  }

  void countAnew()
  return { which, of, kits, items, format, unprinted, labels, printed, busy, error, field, print }
}

/** Where the next print begins, so that a sheet that was begun is used up. */
function nextFreeCell(format: TagFormat, labels: number): number {
  const cells = cellsPerSheet(TAG_SHEETS[format.paper][format.size])
  return ((format.startCell - 1 + labels) % cells) + 1
}
