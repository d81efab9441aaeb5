import type { Request, Response, Router } from 'express'
import type { Endpoint, BodyOf, ParamsOf, QueryOf, ResponseOf } from '#shared/contracts/endpoint.ts'
import type { Actor, Caller } from '../caller.ts'
import { AppError } from '../errors.ts'
import { readJsonBody } from '../middleware/json-body.ts'
import { checkAccess } from './access.ts'
import { parseBody, parseParams, parseQuery } from './parse-request.ts'
import { sendJson } from './send-json.ts'

/** A handler returns this when it has written the answer itself (a file, a stream, prepared bytes). */
export const ANSWERED = Symbol('answered')

type CallerOf<E> = E extends { access: { scope: 'public' } } ? Caller | undefined : Caller

export interface Input<E extends Endpoint> {
  readonly params: ParamsOf<E>
  readonly query: QueryOf<E>
  readonly body: BodyOf<E>
  readonly by: CallerOf<E>
  readonly actor: Actor
  /** The version in `If-Match`; present exactly when the contract is `versioned`. */
  readonly version: E extends { versioned: true } ? number : undefined
  readonly req: Request
  readonly res: Response
}

type Answer<E> = typeof ANSWERED | (E extends { response: object } ? ResponseOf<E> : void)

/** The endpoints that were bound, in order: the source of the OpenAPI document and of `Allow`. */
export class EndpointRouter {
  readonly endpoints: Endpoint[] = []

  constructor(readonly router: Router) {}

  /** Binds a contract to its handler. Rights come first, before a byte of the body is read. */
  add<E extends Endpoint>(endpoint: E, handle: (input: Input<E>) => Promise<Answer<E>>): void {
    requireRule(endpoint)
    this.endpoints.push(endpoint)
    this.router[endpoint.method](endpoint.path, async (req, res) => {
      checkAccess(endpoint.access, req.caller)
      const input = await readInput(endpoint, req, res)
      const answer = await handle(input)
      if (answer === ANSWERED) return
      sendJson(req, res, endpoint, answer)
    })
  }
}

async function readInput<E extends Endpoint>(endpoint: E, req: Request, res: Response): Promise<Input<E>> {
  const params = parseParams(endpoint, req)
  const query = parseQuery(endpoint, req)
  const body = endpoint.body ? parseBody(endpoint, await readJsonBody(req, res)) : undefined
  const input = {
    params,
    query,
    body,
    by: req.caller,
    actor: actorOf(req),
    version: endpoint.versioned ? readVersion(req) : undefined,
    req,
    res,
  }
  return input as Input<E>
}

function actorOf(req: Request): Actor {
  return (
    req.caller?.actor ?? {
      memberId: null,
      name: 'Signed out',
      address: req.ip ?? '',
      requestId: req.requestId,
    }
  )
}

function requireRule(endpoint: Endpoint): void {
  const { access, name } = endpoint
  const valid = access?.scope === 'public' || (access?.roles?.length ?? 0) > 0
  if (!valid)
    throw new Error(`The endpoint ${name} has no access rule: denied by default, so it may not start.`)
}

function readVersion(req: Request): number {
  const header = req.get('If-Match')
  if (header === undefined) throw new AppError('version-missing', 'Send If-Match with the version you read.')
  const match = /^(?:W\/)?"(\d{1,9})"$/.exec(header.trim())
  if (!match) throw new AppError('version-stale', 'If-Match holds no version of this record.')
  return Number(match[1])
}
