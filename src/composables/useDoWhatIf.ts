import { ref, shallowRef } from 'vue'
import type { BodyInputOf } from '#shared/contracts/endpoint.ts'
import { doWhatIf, type WhatIfDone } from '#shared/contracts/what-if.ts'
import { callApi } from '@/api/call-api.ts'
import { uuidv7 } from '@/api/new-id.ts'
import { useProblem } from './useProblem.ts'

/** Does a what-if. Its id is made once, so that pressing twice or sending again does it once. */
export function useDoWhatIf() {
  const busy = ref(false)
  const done = shallowRef<WhatIfDone | null>(null)
  const { error, field, run } = useProblem()
  let whatIfId = uuidv7()
  let sent = ''

  async function doIt(body: BodyInputOf<typeof doWhatIf>): Promise<WhatIfDone | undefined> {
    // Another content is another what-if: an answer that got lost must not stand in its way.
    if (sent !== '' && sent !== JSON.stringify(body)) whatIfId = uuidv7()
    sent = JSON.stringify(body)
    busy.value = true
    const answer = await run(() => callApi(doWhatIf, { params: { whatIfId }, body }))
    busy.value = false
    if (!answer) return undefined
    done.value = answer
    whatIfId = uuidv7()
    sent = ''
    return answer
  }

  return { busy, done, error, field, doIt, forget: () => void (done.value = null) }
}
