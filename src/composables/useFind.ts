import { onScopeDispose, shallowReadonly, shallowRef } from 'vue'
import { listItems } from '#shared/contracts/items.ts'
import { listKits } from '#shared/contracts/kits.ts'
import { findTag } from '#shared/contracts/tags.ts'
import { heardTag } from '#shared/engine/heard-tag.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { verifyTag } from '#shared/engine/tag.ts'
import { callApi } from '@/api/call-api.ts'
import { isProblem } from '@/api/problem-error.ts'
import { CATEGORY_WORDS } from '@/words.ts'

/** One thing that may be the one looked for. */
export interface Found {
  readonly kind: 'kit' | 'item'
  readonly id: string
  readonly designation: string
  readonly tag: string
  /** What it is and where, in words. */
  readonly about: string
}

export type FindState =
  | { readonly status: 'idle' | 'looking' }
  | { readonly status: 'failed'; readonly error: unknown }
  | {
      readonly status: 'found'
      readonly things: readonly Found[]
      /** There are more than are shown. */
      readonly more: boolean
      /** Why what was typed is no tag, in case it was meant as one. */
      readonly fault: string
    }

/** Rows asked of each list: a screenful for a thumb. */
const ROWS = 8

/** Looks for kits and items by a tag as it was typed or heard, or by designation, maker or model. */
export function useFind() {
  const state = shallowRef<FindState>({ status: 'idle' })
  let running = new AbortController()

  async function look(text: string): Promise<void> {
    running.abort()
    const { signal } = (running = new AbortController())
    if (text.trim() === '') return void (state.value = { status: 'idle' })
    state.value = { status: 'looking' }
    try {
      const found = await lookUp(text, signal)
      if (!signal.aborted) state.value = found
    } catch (error) {
      if (!signal.aborted) state.value = { status: 'failed', error }
    }
  }

  onScopeDispose(() => running.abort())
  return { state: shallowReadonly(state), look }
}

async function lookUp(text: string, signal: AbortSignal): Promise<FindState> {
  const tag = verifyTag(heardTag(text))
  const carrier = isFailure(tag) ? null : await carrierOf(tag, signal)
  if (carrier) return { status: 'found', things: [carrier], more: false, fault: '' }
  const { things, total } = await search(text.trim(), signal)
  return {
    status: 'found',
    things,
    more: total > things.length,
    fault: isFailure(tag) ? tag.message : `Nothing in your group carries the tag ${tag}.`,
  }
}

async function carrierOf(tag: string, signal: AbortSignal): Promise<Found | null> {
  try {
    const { kind, id, designation, retired } = await callApi(findTag, { params: { tag }, signal })
    return { kind, id, designation, tag, about: retired ? 'carries this tag, retired' : 'carries this tag' }
  } catch (error) {
    if (isProblem(error, 'not-found')) return null
    throw error
  }
}

async function search(text: string, signal: AbortSignal): Promise<{ things: Found[]; total: number }> {
  const query = { search: text.slice(0, 80), size: ROWS, retired: 'any' as const }
  const [kits, items] = await Promise.all([
    callApi(listKits, { query, signal }),
    callApi(listItems, { query, signal }),
  ])
  const things = [
    ...kits.rows.map((kit): Found => ({
      kind: 'kit',
      id: kit.id,
      designation: kit.designation,
      tag: kit.tag,
      about: [kit.kind.name, kit.place?.name, kit.retiredAt && 'retired'].filter(Boolean).join(', '),
    })),
    ...items.rows.map((item): Found => ({
      kind: 'item',
      id: item.id,
      designation: item.designation,
      tag: item.tag,
      about: [
        CATEGORY_WORDS[item.category],
        item.kit ? `in ${item.kit.designation}` : item.place?.name,
        item.retiredAt && 'retired',
      ]
        .filter(Boolean)
        .join(', '),
    })),
  ]
  return { things, total: kits.total + items.total }
}
