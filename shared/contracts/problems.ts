/** Every problem the service can answer. Codes are permanent: the client switches on them. */
export const PROBLEMS = {
  'request-malformed': { status: 400, title: 'The request cannot be read' },
  'sign-in-needed': { status: 401, title: 'Sign in first' },
  'sign-in-refused': { status: 401, title: 'The address or the password is not right' },
  'not-allowed': { status: 403, title: 'Your roles do not allow this' },
  'password-needed': { status: 403, title: 'Enter your password again to go on' },
  'origin-refused': { status: 403, title: 'The request does not come from this site' },
  'not-found': { status: 404, title: 'There is no such thing here' },
  'method-not-allowed': { status: 405, title: 'This address does not take that method' },
  'already-exists': { status: 409, title: 'Something with that name or number exists already' },
  'id-taken': { status: 409, title: 'That id was used before with other content' },
  'state-conflict': { status: 409, title: 'The record is in a state that does not allow this' },
  'already-superseded': { status: 409, title: 'This test was already corrected' },
  'version-stale': { status: 412, title: 'Somebody else changed this since you read it' },
  'body-too-large': { status: 413, title: 'The request is too large' },
  'content-type-refused': { status: 415, title: 'This kind of content is not taken here' },
  'request-invalid': { status: 422, title: 'Some fields need another look' },
  'link-invalid': { status: 422, title: 'This link is not valid any more' },
  'version-missing': { status: 428, title: 'The change does not say which version it was made from' },
  'too-many-tries': { status: 429, title: 'Too many tries: wait a little' },
  'headers-too-large': { status: 431, title: 'The headers are too large' },
  'internal-error': { status: 500, title: 'Something went wrong on our side' },
  unavailable: { status: 503, title: 'The service is not available for the moment' },
  'storage-full': { status: 507, title: 'There is no space left to store this' },
} as const

export type ProblemCode = keyof typeof PROBLEMS

/** A field at fault, named by a JSON pointer into the body, the query or the path. */
export interface FieldProblem {
  readonly pointer: string
  readonly detail: string
}

/** RFC 9457 problem details, as every error answers them. */
export interface ProblemDetails {
  readonly type: string
  readonly title: string
  readonly status: number
  readonly code: ProblemCode
  readonly detail?: string
  readonly requestId: string
  readonly errors?: readonly FieldProblem[]
  /** `version-stale`: the record as it is now. */
  readonly current?: unknown
}
