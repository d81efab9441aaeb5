/** Every operation of the OpenAPI document, and how to try it. */
import { BODIES } from './operation-bodies.ts'
import { sampleOf, type JsonSchema } from './sample-of-schema.ts'
import type { TestApp } from './test-app.ts'
import { TEST_ORIGIN } from './test-client.ts'

export interface Operation {
  readonly name: string
  readonly method: string
  /** OpenAPI notation: `/api/v1/kits/{kitId}`. */
  readonly path: string
  readonly access: { scope: 'public' | 'group' | 'self'; roles?: string[] }
  readonly params: readonly string[]
  /** Query parameters that it cannot do without. */
  readonly query: readonly Parameter[]
  readonly optionalQuery: readonly string[]
  readonly body: JsonSchema | undefined
  /** Takes a file as multipart/form-data. */
  readonly upload: boolean
  readonly versioned: boolean
}

interface Parameter {
  name: string
  in: 'path' | 'query' | 'header'
  required: boolean
  schema: JsonSchema
}

interface DocumentOperation {
  operationId: string
  'x-access': Operation['access']
  parameters: Parameter[]
  requestBody?: {
    content: { 'application/json'?: { schema: JsonSchema }; 'multipart/form-data'?: object }
  }
}

export async function readOperations(app: TestApp): Promise<Operation[]> {
  const { body } = await app.request().get('/api/v1/openapi.json').expect(200)
  const { paths } = body as { paths: Record<string, Record<string, DocumentOperation>> }
  return Object.entries(paths).flatMap(([path, methods]) =>
    Object.entries(methods).map(([method, operation]) => ({
      name: operation.operationId,
      method: method.toUpperCase(),
      path,
      access: operation['x-access'],
      params: operation.parameters.filter((each) => each.in === 'path').map((each) => each.name),
      query: operation.parameters.filter((each) => each.in === 'query' && each.required),
      optionalQuery: operation.parameters
        .filter((each) => each.in === 'query' && !each.required)
        .map((each) => each.name),
      body: operation.requestBody?.content['application/json']?.schema,
      upload: operation.requestBody?.content['multipart/form-data'] !== undefined,
      versioned: operation.parameters.some((each) => each.name === 'If-Match'),
    })),
  )
}

/** Creates under an id made by the client. */
export function isCreation({ method, params }: Operation): boolean {
  return method === 'PUT' && params.length > 0
}

export interface Answer {
  readonly status: number
  /** The problem without what differs from request to request. */
  readonly problem: unknown
}

/** Names a record by the path parameter or the field of a body that stands for it. */
export type Ids = (name: string) => string

/** Tries an operation with ids of the caller's choice and otherwise a body made from its schema. */
export async function tryOperation(
  app: TestApp,
  operation: Operation,
  { cookie, ids }: { cookie?: string; ids: Ids },
): Promise<Answer> {
  const path = operation.path.replace(/\{(\w+)\}/g, (_, name: string) => ids(name))
  const query = new URLSearchParams(
    operation.query.map(({ name, schema }) => [name, String(sampleOf(schema, ids, name))]),
  )
  const ending = new AbortController()
  const response = await fetch(`${app.url}${path}?${query}`, {
    method: operation.method,
    signal: ending.signal,
    headers: {
      Origin: TEST_ORIGIN,
      ...(cookie && { Cookie: cookie }),
      ...(operation.versioned && { 'If-Match': '"1"' }),
      ...(operation.body && { 'Content-Type': 'application/json' }),
    },
    ...(operation.body && { body: JSON.stringify(bodyFor(operation, operation.body, ids)) }),
    ...(operation.upload && { body: sampleUpload() }),
  })
  const isProblem = response.headers.get('Content-Type')?.startsWith('application/problem+json')
  const problem = isProblem ? problemOf(await response.text(), operation.params.map(ids)) : undefined
  // An event stream would go on for ever.
  ending.abort()
  return { status: response.status, problem }
}

/** The smallest file of the first kind that can be uploaded. */
function sampleUpload(): FormData {
  const form = new FormData()
  form.set('file', new Blob(['# MHz S RI R 50\n7 0.1 0\n']), 'sample.s1p')
  return form
}

/** Without the request's id and the ids that were asked for, which an answer may repeat. */
function problemOf(text: string, asked: readonly string[]): unknown {
  const plain = asked.reduce((rest, id) => rest.replaceAll(id, '…'), text)
  return { ...(JSON.parse(plain) as object), requestId: '' }
}

function bodyFor({ name }: Operation, schema: JsonSchema, ids: Ids): unknown {
  return BODIES[name]?.(ids) ?? sampleOf(schema, ids)
}
