import { z } from 'zod'
import type { Endpoint } from '#shared/contracts/endpoint.ts'
import { PROBLEMS } from '#shared/contracts/problems.ts'

/** The OpenAPI 3.1 document of the endpoints that are really bound, with each one's rule as `x-access`. */
export function openApiDocument(endpoints: readonly Endpoint[]): object {
  const paths: Record<string, Record<string, unknown>> = {}
  for (const endpoint of endpoints) {
    const path = endpoint.path.replace(/:(\w+)/g, '{$1}')
    paths[path] = { ...paths[path], [endpoint.method]: operation(endpoint) }
  }
  return {
    openapi: '3.1.0',
    info: { title: 'Halyard', version: '1' },
    paths,
    components: { schemas: { Problem: problemSchema() } },
  }
}

function operation(endpoint: Endpoint): object {
  return {
    operationId: endpoint.name,
    summary: endpoint.summary,
    'x-access': endpoint.access,
    parameters: [
      ...parameters(endpoint.params, 'path'),
      ...parameters(endpoint.query, 'query'),
      ...versionHeader(endpoint),
    ],
    ...(endpoint.body && {
      requestBody: { required: true, content: json(schemaOf(endpoint.body, 'input')) },
    }),
    ...(endpoint.upload && { requestBody: { required: true, content: UPLOAD } }),
    responses: {
      [endpoint.status ?? (endpoint.response ? 200 : 204)]: {
        description: 'Done',
        ...(endpoint.response && { content: json(schemaOf(endpoint.response, 'output')) }),
        ...(endpoint.media && {
          content: { [endpoint.media]: { schema: { type: 'string', format: 'binary' } } },
        }),
      },
      default: {
        description: ['Problem details.', ...(endpoint.problems ?? [])].join(' '),
        content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
      },
    },
  }
}

/** One file in the field `file`. */
const UPLOAD = {
  'multipart/form-data': {
    schema: {
      type: 'object',
      required: ['file'],
      properties: { file: { type: 'string', format: 'binary' } },
    },
  },
}

const json = (schema: object) => ({ 'application/json': { schema } })

function schemaOf(schema: z.ZodType, io: 'input' | 'output'): object {
  const { $schema: _, ...rest } = z.toJSONSchema(schema, {
    io,
    unrepresentable: 'any',
    target: 'draft-2020-12',
  })
  return rest
}

function parameters(schema: z.ZodType | undefined, place: 'path' | 'query'): object[] {
  if (!schema) return []
  const { properties = {}, required = [] } = schemaOf(schema, 'input') as {
    properties?: Record<string, object>
    required?: string[]
  }
  return Object.entries(properties).map(([name, inner]) => ({
    name,
    in: place,
    required: place === 'path' || required.includes(name),
    schema: inner,
  }))
}

function versionHeader(endpoint: Endpoint): object[] {
  if (!endpoint.versioned) return []
  return [{ name: 'If-Match', in: 'header', required: true, schema: { type: 'string' } }]
}

function problemSchema(): object {
  return {
    type: 'object',
    required: ['type', 'title', 'status', 'code', 'requestId'],
    properties: {
      type: { type: 'string' },
      title: { type: 'string' },
      status: { type: 'integer' },
      code: { enum: Object.keys(PROBLEMS) },
      detail: { type: 'string' },
      requestId: { type: 'string' },
      errors: {
        type: 'array',
        items: { type: 'object', properties: { pointer: { type: 'string' }, detail: { type: 'string' } } },
      },
    },
  }
}
