import { computed, ref, shallowRef, toRaw, watch, type ComputedRef, type Ref } from 'vue'
import type { z } from 'zod'
import type { ProblemError } from '@/api/problem-error.ts'
import { issueText, type LimitWriter } from '@/format/issue.ts'

/**
 * What is wrong with a draft, field by field. `path` is that of the JSON pointer without `#/`: "details/ratedAh". A
 * field speaks up once it was left or saving was tried; what the service found wrong stands until that field changes.
 */
export function useDraftFaults<Draft extends object>(
  draft: Ref<Draft>,
  check: (draft: Draft) => z.ZodSafeParseResult<unknown>,
  problem: ComputedRef<ProblemError | null>,
) {
  const touched = ref(new Set<string>())
  const all = ref(false)
  const claimed = ref(new Map<string, number>())
  const refused = shallowRef<unknown>(null)
  const issues = computed(() => issuesOf(check(draft.value)))
  watch(problem, (now) => (refused.value = now ? deepRaw(draft.value) : null))

  function message(path: string, limitText?: LimitWriter): string {
    const issue = issues.value.get(path)
    if (issue) return all.value || touched.value.has(path) ? issueText(issue, limitText) : ''
    const found = problem.value?.fields.get(`#/${path}`)
    return found && same(at(refused.value, path), at(draft.value, path)) ? found : ''
  }

  /** Sentences of faults that no field on the screen shows. */
  const unclaimed = computed(() => {
    const local = all.value ? [...issues.value].map(([path, issue]) => [path, issueText(issue)] as const) : []
    const found = [...(problem.value?.fields ?? [])].map(
      ([pointer, text]) => [pointer.slice(2), text] as const,
    )
    return [...local, ...found].filter(([path]) => !claimed.value.has(path)).map(([, text]) => text)
  })

  return {
    count: computed(() => issues.value.size),
    message,
    unclaimed,
    touch: (path: string) => void touched.value.add(path),
    claim: (path: string) => void claimed.value.set(path, (claimed.value.get(path) ?? 0) + 1),
    release(path: string): void {
      const left = (claimed.value.get(path) ?? 0) - 1
      if (left > 0) claimed.value.set(path, left)
      else claimed.value.delete(path)
    },
    showAll: () => void (all.value = true),
    forgive(): void {
      all.value = false
      touched.value = new Set()
    },
  }
}

export type DraftFaults = Pick<ReturnType<typeof useDraftFaults>, 'message' | 'touch' | 'claim' | 'release'>

/** The first fault of each field. */
function issuesOf(result: z.ZodSafeParseResult<unknown>): Map<string, z.core.$ZodIssue> {
  const found = new Map<string, z.core.$ZodIssue>()
  for (const issue of result.error?.issues ?? []) {
    const path = issue.path.map(String).join('/')
    if (!found.has(path)) found.set(path, issue)
  }
  return found
}

function at(value: unknown, path: string): unknown {
  return path
    .split('/')
    .reduce<unknown>((part, name) => (part as Record<string, unknown> | null | undefined)?.[name], value)
}

const same = (a: unknown, b: unknown) => JSON.stringify(a) === JSON.stringify(b)
const deepRaw = (value: unknown): unknown => JSON.parse(JSON.stringify(toRaw(value)))
