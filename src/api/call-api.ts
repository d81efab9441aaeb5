import type { BodyInputOf, Endpoint, ParamsOf, QueryInputOf, ResponseOf } from '#shared/contracts/endpoint.ts'
import type { ProblemDetails } from '#shared/contracts/problems.ts'
import { ProblemError, problemFromDetails } from './problem-error.ts'
import { addressOf } from './address.ts'

const TIME_OUT_MS = 15_000
/** A photo over a slow line. */
const UPLOAD_TIME_OUT_MS = 120_000

/** Present exactly where the contract names it. */
type Part<E, Name extends string, Value> =
  E extends Readonly<Record<Name, unknown>>
    ? Readonly<Record<Name, Value>>
    : { readonly [K in Name]?: undefined }

/** What a call needs, as its contract says: `params`, `query`, `body` and, where it is versioned, `version`. */
export type Call<E extends Endpoint> = Part<E, 'params', ParamsOf<E>> & {
  readonly query?: QueryInputOf<E>
} & Part<E, 'body', BodyInputOf<E>> &
  (E extends { versioned: true } ? { readonly version: number } : { readonly version?: undefined }) & {
    readonly signal?: AbortSignal
    /** A file to send, in place of a body. */
    readonly form?: FormData
    /** Hears when the service answered, by its own clock, epoch ms: an answer kept by the browser says when it was made. */
    readonly answered?: (atMs: number) => void
    /** An answer that was asked for before the application had loaded: read instead of asking again. */
    readonly early?: Promise<Response>
  }

/** What the application does when the service asks for the password again, or says that nobody is signed in. */
interface Reactions {
  /** True when the password was given, so that the call is worth repeating. */
  askPassword(): Promise<boolean>
  signedOut(): void
}

let reactions: Reactions = { askPassword: async () => false, signedOut: () => undefined }

export function setReactions(given: Reactions): void {
  reactions = given
}

/** Asks the service; the only place that fetches. Throws `ProblemError` for every "no" and for silence. */
export function callApi<E extends Endpoint>(endpoint: E, call: Call<E>): Promise<ResponseOf<E>> {
  return reacting((again) => callOnce(endpoint, again ? { ...call, early: undefined } : call))
}

/** Asks for a file, such as a PDF; problems are thrown as by `callApi`. */
export function callForFile<E extends Endpoint & { readonly media: string }>(
  endpoint: E,
  call: Call<E>,
): Promise<Blob> {
  return reacting(async () => {
    const response = await send(endpoint, call)
    call.answered?.(Date.parse(response.headers.get('Date') ?? ''))
    if (!response.ok) throw await problemOf(response)
    return response.blob()
  })
}

/** Does the work, once more when the service wanted the password and got it. */
async function reacting<T>(work: (again: boolean) => Promise<T>): Promise<T> {
  try {
    return await work(false)
  } catch (error) {
    if (!(error instanceof ProblemError)) throw error
    if (error.code === 'password-needed' && (await reactions.askPassword())) return work(true)
    if (error.code === 'sign-in-needed') reactions.signedOut()
    throw error
  }
}

async function callOnce<E extends Endpoint>(endpoint: E, call: Call<E>): Promise<ResponseOf<E>> {
  const response = await send(endpoint, call)
  call.answered?.(Date.parse(response.headers.get('Date') ?? ''))
  if (!response.ok) throw await problemOf(response)
  if (!endpoint.response) return undefined as ResponseOf<E>
  const answer = endpoint.response.safeParse(await bodyOf(response))
  if (answer.success) return answer.data as ResponseOf<E>
  throw new ProblemError({
    code: 'answer-unreadable',
    detail: 'The page is older than the service. Load the page again.',
  })
}

async function send<E extends Endpoint>(endpoint: E, call: Call<E>): Promise<Response> {
  const timeOut = AbortSignal.timeout(call.form ? UPLOAD_TIME_OUT_MS : TIME_OUT_MS)
  try {
    if (call.early) return await orTimeOut(call.early, timeOut)
    return await fetch(addressOf(endpoint.path, call.params, call.query), {
      method: endpoint.method.toUpperCase(),
      headers: headersOf(call),
      body: call.form ?? (call.body === undefined ? undefined : JSON.stringify(call.body)),
      credentials: 'same-origin',
      signal: call.signal ? AbortSignal.any([call.signal, timeOut]) : timeOut,
    })
  } catch (error) {
    if (call.signal?.aborted) throw error
    if (timeOut.aborted) throw new ProblemError({ code: 'timed-out', detail: timedOutDetail(endpoint) })
    throw new ProblemError({ code: 'no-connection', detail: 'Look at the network and try again.' })
  }
}

function orTimeOut<T>(promise: Promise<T>, timeOut: AbortSignal): Promise<T> {
  return new Promise((resolve, reject) => {
    timeOut.addEventListener('abort', () => reject(timeOut.reason as Error))
    promise.then(resolve, reject)
  })
}

function timedOutDetail(endpoint: Endpoint): string {
  return endpoint.method === 'get'
    ? 'Try again.'
    : 'It may have been stored. Trying again is safe: nothing is stored twice.'
}

function headersOf(call: { readonly body?: unknown; readonly version?: number }): Record<string, string> {
  return {
    Accept: 'application/json',
    ...(call.body !== undefined && { 'Content-Type': 'application/json' }),
    ...(call.version !== undefined && { 'If-Match': `"${call.version}"` }),
  }
}

async function problemOf(response: Response): Promise<ProblemError> {
  const details = (await bodyOf(response)) as ProblemDetails
  return problemFromDetails(details, response.headers.get('Retry-After'))
}

async function bodyOf(response: Response): Promise<unknown> {
  const json = /\bjson\b/.test(response.headers.get('Content-Type') ?? '')
  try {
    if (json) return await response.json()
  } catch {
    // A cut-off answer is as unreadable as one of another kind.
  }
  throw new ProblemError({
    code: 'answer-unreadable',
    status: response.status,
    detail: 'Something between this device and the service answered in its place.',
  })
}
