import { computed, onScopeDispose, shallowRef, watch } from 'vue'
import type { RecordableProcedure } from '#shared/contracts/record-test.ts'
import { isFailure, type Failure } from '#shared/engine/outcome.ts'
import type { KnownForTest, Performance } from '#shared/engine/procedures/judge-test.ts'
import type { Judgement } from '#shared/engine/procedures/judgement.ts'
import { askEngine } from '@/measure/ask-engine.ts'
import { failurePath } from '@/measure/failure-path.ts'
import { liveInputs } from '@/measure/live-inputs.ts'

export type LiveState =
  | { readonly status: 'incomplete' | 'away' }
  | { readonly status: 'judged'; readonly judgement: Judgement; readonly leftOut: number }
  /** `path` names the field at fault, null where no field is named. */
  | { readonly status: 'failed'; readonly failure: Failure; readonly path: string | null }

interface Watched {
  readonly procedure: RecordableProcedure
  /** What would be sent; anything reactive that it reads is followed. */
  readonly inputs: () => unknown
  readonly known: () => KnownForTest
  /** Something else that the figures hang on, such as a file that the worker gets later. */
  readonly follows?: () => unknown
}

/** A person types in bursts: judged once they pause. */
const PAUSE_MS = 180

/**
 * The figures of a test as they will be judged, by the engine that judges on the service, while it is being filled in.
 * The newest question wins; an answer that comes late is thrown away.
 */
export function useLiveJudgement({ procedure, inputs, known, follows }: Watched) {
  const state = shallowRef<LiveState>({ status: 'incomplete' })
  const typed = computed(() => JSON.stringify(inputs() ?? null))
  const live = computed(() => liveInputs(procedure, JSON.parse(typed.value)))
  let newest = 0
  let pause: ReturnType<typeof setTimeout> | undefined

  async function judge(): Promise<void> {
    const mine = ++newest
    const now = live.value
    if (now.status === 'incomplete') return void (state.value = { status: 'incomplete' })
    const performance = { procedure, inputs: now.inputs } as Performance
    const next = await ask(performance, known(), now)
    if (mine === newest) state.value = next
  }

  async function ask(
    performance: Performance,
    facts: KnownForTest,
    { places, leftOut }: Extract<typeof live.value, { status: 'complete' }>,
  ): Promise<LiveState> {
    try {
      // Through JSON: what a component holds is reactive, and a worker takes plain values only.
      const answer = await askEngine('judge', { performance, known: plain(facts) })
      if (!isFailure(answer)) return { status: 'judged', judgement: answer, leftOut }
      return { status: 'failed', failure: answer, path: failurePath(procedure, answer, places) }
    } catch {
      return { status: 'away' }
    }
  }

  watch(
    [typed, () => JSON.stringify(known()), () => follows?.()],
    () => {
      clearTimeout(pause)
      pause = setTimeout(() => void judge(), PAUSE_MS)
    },
    { immediate: true },
  )
  onScopeDispose(() => clearTimeout(pause))

  /** What is wrong with one field as it stands: what it cannot hold, or what the engine says of it. */
  function fault(path: string): string | undefined {
    const own = live.value.faults.get(path)
    if (own) return own
    return state.value.status === 'failed' && state.value.path === path
      ? state.value.failure.message
      : undefined
  }

  return { state, fault, typed }
}

const plain = <T>(value: T): T => JSON.parse(JSON.stringify(value)) as T
