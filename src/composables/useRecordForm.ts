import { computed, reactive, ref, shallowRef, watch, type Ref } from 'vue'
import type { z } from 'zod'
import { uuidv7 } from '@/api/new-id.ts'
import { isProblem } from '@/api/problem-error.ts'
import { useDraftFaults } from './useDraftFaults.ts'
import { useKeptDraft } from './useKeptDraft.ts'
import { useProblem } from './useProblem.ts'

/** How one kind of record is typed, checked and stored. */
export interface FormPlan<Draft extends object, Body, Stored extends { readonly version: number }> {
  /** Names the draft in this tab: "place". */
  readonly name: string
  /** The record to change; null: a new one. */
  readonly id: string | null
  readonly blank: () => Draft
  readonly draftOf: (stored: Stored) => Draft
  /** The draft by the contract of the request. */
  readonly check: (draft: Draft) => z.ZodSafeParseResult<Body>
  readonly read: (id: string) => Promise<Stored>
  readonly create: (id: string, body: Body) => Promise<Stored>
  readonly update: (id: string, body: Body, version: number) => Promise<Stored>
}

interface Kept<Draft> {
  readonly id: string
  readonly version: number | null
  readonly draft: Draft
}

/**
 * A form for one record: new, under an id that this device makes once, so that saving again stores once; or changed
 * against the version that was read. What is typed is kept in the tab until it is saved or thrown away.
 */
export function useRecordForm<Draft extends object, Body, Stored extends { readonly version: number }>(
  plan: FormPlan<Draft, Body, Stored>,
) {
  const kept = useKeptDraft<Kept<Draft>>(plan.id === null ? `new-${plan.name}` : `${plan.name}.${plan.id}`)
  const { error, problem, run } = useProblem()
  const draft = ref(plan.blank()) as Ref<Draft>
  const start = shallowRef('')
  const id = shallowRef(plan.id ?? uuidv7())
  const stored = shallowRef<Stored | null>(null)
  const base = shallowRef<number | null>(null)
  const theirs = shallowRef<Stored | null>(null)
  const restored = ref(false)
  const busy = ref(false)
  const status = ref<'loading' | 'failed' | 'ready'>('loading')
  const faults = useDraftFaults(draft, plan.check, problem)

  async function load(): Promise<void> {
    status.value = 'loading'
    const read = plan.id === null ? null : await run(() => plan.read(plan.id as string))
    if (read === undefined) return void (status.value = 'failed')
    begin(read)
    restore()
    status.value = 'ready'
  }

  function begin(from: Stored | null): void {
    stored.value = from
    base.value = from?.version ?? null
    draft.value = from ? plan.draftOf(from) : plan.blank()
    start.value = JSON.stringify(draft.value)
    faults.forgive()
  }

  function restore(): void {
    const last = kept.read()
    if (!last) return
    restored.value = true
    id.value = last.id
    base.value = last.version
    draft.value = last.draft
  }

  /** The record as stored, or undefined with the reason on the form. `over`: a newer version that the draft replaces. */
  async function save(over?: Stored): Promise<Stored | undefined> {
    faults.showAll()
    const checked = plan.check(draft.value)
    if (!checked.success) return undefined
    busy.value = true
    const saved = await run(() => store(checked.data, over?.version ?? base.value))
    theirs.value = isProblem(error.value, 'version-stale') ? (error.value.current as Stored) : null
    busy.value = false
    if (saved) kept.forget()
    return saved
  }

  async function store(body: Body, version: number | null): Promise<Stored> {
    if (version !== null) return plan.update(id.value, body, version)
    try {
      return await plan.create(id.value, body)
    } catch (thrown) {
      if (!isProblem(thrown, 'id-taken')) throw thrown
      // An earlier try was stored although its answer got lost, and the draft has changed since.
      const first = await plan.read(id.value)
      return plan.update(id.value, body, first.version)
    }
  }

  /** Their version comes into the form; mine is gone. */
  function takeTheirs(): void {
    if (theirs.value) begin(theirs.value)
    theirs.value = null
    forget()
  }

  function forget(): void {
    kept.forget()
    restored.value = false
  }

  /** Throws away what was typed. */
  function discard(): void {
    forget()
    if (plan.id === null) id.value = uuidv7()
    begin(stored.value)
  }

  watch(
    draft,
    (value) => {
      if (status.value !== 'ready') return
      if (JSON.stringify(value) === start.value) kept.forget()
      else kept.keep({ id: id.value, version: base.value, draft: value })
    },
    { deep: true },
  )
  void load()

  return reactive({
    draft,
    stored,
    theirs,
    status,
    busy,
    error,
    restored,
    isNew: plan.id === null,
    invalid: computed(() => faults.count.value > 0),
    faults,
    load,
    save,
    takeTheirs,
    /** Back to the form with both versions as they are. */
    goBack: () => void (theirs.value = null),
    discard,
    draftOf: plan.draftOf,
  })
}
