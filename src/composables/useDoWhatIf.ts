import { ref, shallowRef } from 'vue'
import type { BodyInputOf } from '#shared/contracts/endpoint.ts'
import { doWhatIf, type WhatIfDone } from '#shared/contracts/what-if.ts'
import { callApi } from '@/api/call-api.ts'
import { idByContent } from '@/api/new-id.ts'
import { useProblem } from './useProblem.ts'

/** Does a what-if; pressing twice or sending again does it once. */
export function useDoWhatIf() {
  const busy = ref(false)
  const done = shallowRef<WhatIfDone | null>(null)
  const { error, field, run } = useProblem()
  const ids = idByContent()

  async function doIt(body: BodyInputOf<typeof doWhatIf>): Promise<WhatIfDone | undefined> {
    busy.value = true
    const answer = await run(() => callApi(doWhatIf, { params: { whatIfId: ids.of(body) }, body }))
    busy.value = false
    if (!answer) return undefined
    done.value = answer
    ids.done()
    return answer
  }

  return { busy, done, error, field, doIt, forget: () => void (done.value = null) }
}
