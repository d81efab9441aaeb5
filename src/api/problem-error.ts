import { PROBLEMS, type ProblemCode, type ProblemDetails } from '#shared/contracts/problems.ts'

/** What can go wrong before an answer of the service is there; the rest are the service's own codes. */
const CLIENT_PROBLEMS = {
  'no-connection': 'The service cannot be reached',
  'timed-out': 'The service did not answer in time',
  'answer-unreadable': 'The answer cannot be read',
} as const

export type ClientProblemCode = keyof typeof CLIENT_PROBLEMS
export type AnyProblemCode = ProblemCode | ClientProblemCode

interface ProblemParts {
  readonly code: AnyProblemCode
  readonly title?: string
  readonly detail?: string
  readonly status?: number
  readonly requestId?: string
  readonly fields?: ReadonlyMap<string, string>
  readonly current?: unknown
  readonly retryAfterSeconds?: number
}

/** The one error that `callApi` throws. `fields` holds messages by JSON pointer into the body: `#/serial`. */
export class ProblemError extends Error {
  readonly code: AnyProblemCode
  readonly title: string
  readonly detail: string
  /** 0 where no answer came. */
  readonly status: number
  readonly requestId: string | undefined
  readonly fields: ReadonlyMap<string, string>
  /** `version-stale`: the record as it is now. */
  readonly current: unknown
  readonly retryAfterSeconds: number | undefined

  constructor(parts: ProblemParts) {
    const title = parts.title ?? titleOf(parts.code)
    super(`${parts.code}: ${parts.detail ?? title}`)
    this.name = 'ProblemError'
    this.code = parts.code
    this.title = title
    this.detail = parts.detail ?? ''
    this.status = parts.status ?? 0
    this.requestId = parts.requestId
    this.fields = parts.fields ?? new Map()
    this.current = parts.current
    this.retryAfterSeconds = parts.retryAfterSeconds
  }

  /** No answer, or one that says to come back later: sending the same again is safe and may succeed. */
  get isTemporary(): boolean {
    return this.status === 0 || this.status === 429 || this.status === 503
  }
}

export function problemFromDetails(details: ProblemDetails, retryAfter: string | null): ProblemError {
  const seconds = Number(retryAfter)
  return new ProblemError({
    ...details,
    fields: new Map(details.errors?.map(({ pointer, detail }) => [pointer, detail])),
    retryAfterSeconds: retryAfter !== null && Number.isFinite(seconds) ? seconds : undefined,
  })
}

export function isProblem(error: unknown, code: AnyProblemCode): error is ProblemError {
  return error instanceof ProblemError && error.code === code
}

function titleOf(code: AnyProblemCode): string {
  return code in CLIENT_PROBLEMS
    ? CLIENT_PROBLEMS[code as ClientProblemCode]
    : PROBLEMS[code as ProblemCode].title
}
