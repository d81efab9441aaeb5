import { shallowRef } from 'vue'
import { downloadAttachment, type TestAttachment } from '#shared/contracts/attachments.ts'
import type { StoredTest } from '#shared/contracts/test-shapes.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import type { SwrTrace } from '#shared/engine/swr-trace.ts'
import { callForFile } from '@/api/call-api.ts'
import { askEngine } from '@/measure/ask-engine.ts'

export interface RoleTrace extends SwrTrace {
  readonly role: TestAttachment['role']
}

export type TracesState =
  | { readonly status: 'loading' | 'away' }
  | { readonly status: 'shown'; readonly traces: readonly RoleTrace[] }

/** The traces of the files that a test was read from, parsed in the worker. `away`: they cannot be had now. */
export function useTraces(test: StoredTest, roles: readonly TestAttachment['role'][]) {
  const state = shallowRef<TracesState>({ status: 'loading' })
  const files = test.attachments.filter(({ role, kind }) => kind === 'touchstone' && roles.includes(role))

  async function read(): Promise<void> {
    try {
      const traces = await Promise.all(files.map(traceOf))
      state.value = { status: 'shown', traces: traces.flat() }
    } catch {
      state.value = { status: 'away' }
    }
  }

  void read()
  return state
}

async function traceOf({ id, name, role }: TestAttachment): Promise<RoleTrace[]> {
  const file = await callForFile(downloadAttachment, { params: { attachmentId: id } })
  const bytes = new Uint8Array(await file.arrayBuffer())
  const reading = askEngine('read-file', { id, fileName: name, bytes })
  const tracing = askEngine('swr-trace', { id })
  // Asked in order: the worker keeps no file beyond its trace, also where the page is left before it has come.
  void askEngine('forget-file', { id }).catch(() => undefined)
  const [, trace] = await Promise.all([reading, tracing])
  return trace === null || isFailure(trace) ? [] : [{ role, ...trace }]
}
