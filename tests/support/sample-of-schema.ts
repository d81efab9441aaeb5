/** The smallest value that fits a JSON Schema, as far as the schema tells. */

export interface JsonSchema {
  type?: string | string[]
  const?: unknown
  enum?: unknown[]
  default?: unknown
  anyOf?: JsonSchema[]
  oneOf?: JsonSchema[]
  allOf?: JsonSchema[]
  properties?: Record<string, JsonSchema>
  required?: string[]
  items?: JsonSchema
  minItems?: number
  minimum?: number
  exclusiveMinimum?: number
  format?: string
  pattern?: string
}

type Ids = (name: string) => string

let count = 0

/** What a refinement asks of a string and the schema does not tell, by the field's name. */
const BY_NAME: readonly (readonly [RegExp, () => string])[] = [
  [/At$/, () => '2026-05-01T12:00:00Z'],
  [/On$/, () => '2026-06-10'],
  [/^email$/, () => `sample${(count += 1)}@example.org`],
  [/assword$/, () => 'plum cartwheel seldom quarry'],
  [/^token$/, () => 'A'.repeat(43)],
  [/^(quantity|minimum|by|amount)$/, () => '1'],
]

export function sampleOf(schema: JsonSchema, ids: Ids, name = ''): unknown {
  if ('const' in schema) return schema.const
  if (schema.enum) return schema.enum[0]
  const choices = schema.anyOf ?? schema.oneOf
  if (choices) return sampleOf(choices.find(({ type }) => type === 'null') ?? choices[0] ?? {}, ids, name)
  if (schema.allOf)
    return Object.assign({}, ...schema.allOf.map((part) => sampleOf(part, ids, name))) as unknown
  return byType(schema, ids, name)
}

function byType(schema: JsonSchema, ids: Ids, name: string): unknown {
  const type = Array.isArray(schema.type)
    ? schema.type.includes('null')
      ? 'null'
      : schema.type[0]
    : schema.type
  if (type === 'object') return sampleObject(schema, ids)
  if (type === 'array')
    return Array.from({ length: schema.minItems ?? 0 }, () =>
      sampleOf(schema.items ?? {}, ids, singular(name)),
    )
  if (type === 'number' || type === 'integer') return schema.minimum ?? (schema.exclusiveMinimum ?? 0) + 1
  if (type === 'boolean') return false
  if (type === 'string') return sampleString(schema, ids, name)
  return null
}

function sampleObject({ properties = {}, required = [] }: JsonSchema, ids: Ids): object {
  return Object.fromEntries(required.map((name) => [name, sampleOf(properties[name] ?? {}, ids, name)]))
}

function sampleString(schema: JsonSchema, ids: Ids, name: string): string {
  if (schema.format === 'uuid') return ids(name)
  const known = BY_NAME.find(([pattern]) => pattern.test(name))
  return known ? known[1]() : `Sample ${(count += 1)}`
}

const singular = (name: string) => name.replace(/s$/, '')
