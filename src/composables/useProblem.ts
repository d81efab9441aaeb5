import { computed, shallowReadonly, shallowRef } from 'vue'
import { ProblemError } from '@/api/problem-error.ts'

/**
 * The last thing that went wrong on a form. `field('serial')` is the message for one field, found by its JSON pointer;
 * `nested('details', 'ratedAh')` reaches deeper. `run` clears the problem, runs the work and keeps what it throws.
 */
export function useProblem() {
  const error = shallowRef<unknown>(null)
  const problem = computed(() => (error.value instanceof ProblemError ? error.value : null))

  function field(...path: (string | number)[]): string | undefined {
    return problem.value?.fields.get(`#/${path.map(escapePart).join('/')}`)
  }

  async function run<T>(work: () => Promise<T>): Promise<T | undefined> {
    error.value = null
    try {
      return await work()
    } catch (thrown) {
      error.value = thrown
      return undefined
    }
  }

  return { error: shallowReadonly(error), problem, field, run, clear: () => void (error.value = null) }
}

/** RFC 6901: `~` and `/` inside a part are escaped. */
function escapePart(part: string | number): string {
  return String(part).replaceAll('~', '~0').replaceAll('/', '~1')
}
