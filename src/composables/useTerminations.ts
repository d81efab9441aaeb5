import { computed, shallowRef, watch } from 'vue'
import { isFailure, type Failure, type Warning } from '#shared/engine/outcome.ts'
import type { TerminationName } from '#shared/engine/recognise-terminations.ts'
import { askEngine } from '@/measure/ask-engine.ts'
import { rolesOf, withRole, type Roles } from '@/measure/termination-roles.ts'
import type { HeldFiles } from './useHeldFiles.ts'

interface Recognised {
  /** How they were told apart; null: by hand. */
  readonly by: 'names' | 'traces' | null
  readonly warnings: readonly Warning[]
  /** What the traces say where it is not what the names say. */
  readonly suggestion: Roles | null
}

const NOTHING: Recognised = { by: null, warnings: [], suggestion: null }

/** Tells three files apart as soon as they are read, by their names and by their traces; a person has the last word. */
export function useTerminations(held: HeldFiles) {
  const roles = shallowRef<Roles>({})
  const recognised = shallowRef<Recognised>(NOTHING)
  const failure = shallowRef<Failure | null>(null)
  const ids = computed(() => held.list.value.filter((file) => file.facts).map(({ id }) => id))

  async function recognise(): Promise<void> {
    const asked = ids.value
    roles.value = {}
    recognised.value = NOTHING
    failure.value = null
    if (asked.length !== 3) return
    const answer = await askEngine('recognise', { ids: asked }).catch(() => null)
    if (!answer || asked.join() !== ids.value.join()) return
    if (isFailure(answer)) return void (failure.value = answer)
    const { assignment, by, warnings, suggestion } = answer
    roles.value = rolesOf(assignment, asked)
    recognised.value = { by, warnings, suggestion: suggestion ? rolesOf(suggestion, asked) : null }
  }

  function choose(id: string, role: TerminationName): void {
    roles.value = withRole(roles.value, id, role)
    recognised.value = NOTHING
  }

  function takeSuggestion(): void {
    roles.value = recognised.value.suggestion ?? roles.value
    recognised.value = NOTHING
  }

  watch(ids, (now, before) => void (now.join() !== before?.join() && recognise()), { immediate: true })
  return { roles, recognised, failure, choose, takeSuggestion }
}
