import type { KitState } from '#shared/engine/readiness/types.ts'

/** The same kit under names of its own, so that two can stand side by side. */
export function renamed(state: KitState, suffix: string): KitState {
  const own = new Set([state.kit.id, ...state.items.map(({ id }) => id)])
  const name = (id: string) => (own.has(id) ? `${id}${suffix}` : id)
  return {
    ...state,
    kit: { ...state.kit, id: name(state.kit.id) },
    items: state.items.map((item) => ({ ...item, id: name(item.id) })),
    evidence: state.evidence.map((test) => ({
      ...test,
      id: `${test.id}${suffix}`,
      subjectId: name(test.subjectId),
    })),
    raisedChecks: state.raisedChecks.map((check) => ({
      ...check,
      id: `${check.id}${suffix}`,
      subjectId: name(check.subjectId),
    })),
  }
}
