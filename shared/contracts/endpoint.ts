import type { z } from 'zod'
import type { ProblemCode } from './problems.ts'
import type { Role } from './roles.ts'

/**
 * Who may call an endpoint. `public` needs no session. `group` needs a member with one of the roles and reaches that
 * member's group only; `self` reaches only what belongs to the member. Roles add up.
 */
export type Access =
  { readonly scope: 'public' } | { readonly scope: 'group' | 'self'; readonly roles: readonly Role[] }

type Shape = z.ZodType

/** One HTTP operation, described once for both sides and for the OpenAPI document. */
export interface Endpoint<
  Params extends Shape = Shape,
  Query extends Shape = Shape,
  Body extends Shape = Shape,
  Response extends Shape = Shape,
> {
  /** The slug of the use case: file name, operation id and route name. */
  readonly name: string
  readonly method: 'get' | 'post' | 'put' | 'delete'
  /** Express notation, e.g. `/api/v1/items/:itemId`. */
  readonly path: string
  readonly summary: string
  readonly access: Access
  readonly params?: Params
  readonly query?: Query
  readonly body?: Body
  /** Absent: 204 without a body. */
  readonly response?: Response
  readonly status?: 200 | 201 | 202 | 204
  /** The request is `multipart/form-data` with one file in the field `file`; then there is no `body`. */
  readonly upload?: true
  /** The answer is a file of this type instead of JSON; then there is no `response`. */
  readonly media?: string
  /** The change needs the version it was read at, in `If-Match`: 428 when missing, 412 when stale. */
  readonly versioned?: boolean
  /** Problems beyond the ones that every endpoint can answer. */
  readonly problems?: readonly ProblemCode[]
}

export type ParamsOf<E> = E extends { params: infer S extends Shape } ? z.output<S> : Record<string, never>
export type QueryOf<E> = E extends { query: infer S extends Shape } ? z.output<S> : Record<string, never>
export type QueryInputOf<E> = E extends { query: infer S extends Shape } ? z.input<S> : undefined
export type BodyOf<E> = E extends { body: infer S extends Shape } ? z.output<S> : undefined
export type BodyInputOf<E> = E extends { body: infer S extends Shape } ? z.input<S> : undefined
export type ResponseOf<E> = E extends { response: infer S extends Shape } ? z.output<S> : undefined

/** Keeps the literal types of the parts, so that both sides get exact shapes. */
export function defineEndpoint<const E extends Endpoint>(endpoint: E): E {
  return endpoint
}
