import { reactive, ref } from 'vue'
import { recordTest, type RecordTestInput, type RecordableProcedure } from '#shared/contracts/record-test.ts'
import type { TestForm } from '#shared/contracts/test-form.ts'
import type { StoredTest } from '#shared/contracts/test-shapes.ts'
import { callApi } from '@/api/call-api.ts'
import { uuidv7 } from '@/api/new-id.ts'
import { soundFiles, uploadFiles } from '@/api/upload-files.ts'
import type { HeldFiles } from './useHeldFiles.ts'
import { useProblem } from './useProblem.ts'

export interface Correction {
  readonly testId: string
  readonly reason: string
}

/** What every test says beside its readings, as it stands in the form. */
export interface CommonFields {
  /** Local date and time as `datetime-local` writes it. */
  performedAt: string
  method: string
  instrumentId: string
  instrumentNote: string
  notes: string
}

type Subject = { readonly itemId: string } | { readonly kitId: string }

interface Recording {
  readonly subject: Subject
  readonly procedure: RecordableProcedure
  readonly corrects: Correction | null
  readonly common: Partial<CommonFields>
}

interface Sent {
  /** Those that the test is read from; its inputs name them. */
  readonly files?: HeldFiles | undefined
  /** Those beside the readings. */
  readonly attached?: HeldFiles | undefined
}

/**
 * Recording of one test by hand. The id is made once a form, so that pressing twice or sending again records once;
 * what was typed stays through every error.
 */
export function useTestRecord({ subject, procedure, corrects, common: start }: Recording) {
  const { error, field, run, clear } = useProblem()
  const saving = ref(false)
  const testId = uuidv7()
  const common = reactive<CommonFields>({
    performedAt: localInput(new Date()),
    method: '',
    instrumentId: '',
    instrumentNote: '',
    notes: '',
    ...start,
  })

  /** Files are sent before the test, each once however often it is tried. */
  async function record(inputs: unknown, { files, attached }: Sent = {}): Promise<StoredTest | undefined> {
    if (saving.value) return undefined
    saving.value = true
    const { performedAt, instrumentId, ...words } = common
    const body = {
      procedure,
      ...subject,
      ...words,
      performedAt: instantOf(performedAt),
      ...(instrumentId && { instrumentId }),
      ...(corrects && { supersedes: corrects }),
      ...(attached && { attachmentIds: soundFiles(attached).map(({ id }) => id) }),
      inputs,
      // The service checks the readings by the same contract and names the field at fault.
    } as RecordTestInput
    const stored = await run(async () => {
      await uploadFiles([files, attached])
      return callApi(recordTest, { params: { testId }, body })
    })
    saving.value = false
    return stored
  }

  return { common, error, field, clear, saving, record }
}

/** The method and instrument that this member used last, or the first that fit. */
export function commonFrom(form: TestForm): Partial<CommonFields> {
  return {
    method: form.lastMethod ?? form.methods[0]?.name ?? '',
    instrumentId: form.lastInstrument?.id ?? form.instruments[0]?.id ?? '',
  }
}

/** The instant of what a `datetime-local` holds; what is no moment goes out as typed, and the service names the field. */
export function instantOf(local: string): string {
  const at = new Date(local)
  return Number.isNaN(at.getTime()) ? local : at.toISOString()
}

export function localInput(at: Date): string {
  const local = new Date(at.getTime() - at.getTimezoneOffset() * 60_000)
  return local.toISOString().slice(0, 16)
}
