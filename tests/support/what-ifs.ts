/** What-ifs for tests, asked and done through the API. */
import { v7 as uuidv7 } from 'uuid'
import { askWhatIf, doWhatIf, type WhatIfAnswer, type WhatIfDone } from '#shared/contracts/what-if.ts'
import type { TestClient } from './test-client.ts'

export async function asked(by: TestClient, steps: readonly object[]): Promise<WhatIfAnswer> {
  const answer = await by.post('/api/v1/what-if', { steps })
  if (answer.status !== 200) throw new Error(`${answer.status} ${JSON.stringify(answer.body)}`)
  return askWhatIf.response.parse(answer.body)
}

export interface Doing {
  readonly path: string
  readonly body: { readonly steps: readonly object[]; readonly reason: string; readonly basis: string }
}

/** Asked for and not yet sent. */
export async function doingOf(by: TestClient, steps: readonly object[], fields: object = {}): Promise<Doing> {
  const { basis } = await asked(by, steps)
  return {
    path: `/api/v1/what-ifs/${uuidv7()}`,
    body: { steps, reason: 'Storm on Thursday', basis, ...fields },
  }
}

export async function didWhatIf(
  by: TestClient,
  steps: readonly object[],
  fields: object = {},
): Promise<WhatIfDone> {
  const { path, body } = await doingOf(by, steps, fields)
  const answer = await by.put(path, body)
  if (answer.status !== 200) throw new Error(`${answer.status} ${JSON.stringify(answer.body)}`)
  return doWhatIf.response.parse(answer.body)
}
