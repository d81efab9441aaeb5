import type { z } from 'zod'
import { recordTestBody, type RecordableProcedure } from '#shared/contracts/record-test.ts'
import { issueText } from '@/format/issue.ts'

/** Faults of what was typed, by the path of their JSON pointer without `#/`: "inputs/readings/2/swr". */
export type Faults = ReadonlyMap<string, string>

export type LiveInputs =
  | {
      readonly status: 'complete'
      readonly inputs: unknown
      /** For each list the places that were taken, so that a fault of a row finds the row on the screen. */
      readonly places: Readonly<Record<string, readonly number[]>>
      /** Rows that are not finished and so not in the figures. */
      readonly leftOut: number
      readonly faults: Faults
    }
  | { readonly status: 'incomplete'; readonly faults: Faults }

/**
 * What can be judged of a half-filled form: rows that are not finished are left out. A field that is still empty is
 * no fault; one that holds what cannot be is.
 */
export function liveInputs(procedure: RecordableProcedure, typed: unknown): LiveInputs {
  const schema = inputsOf(procedure)
  const whole = schema.safeParse(typed)
  if (whole.success)
    return { status: 'complete', inputs: whole.data, places: {}, leftOut: 0, faults: new Map() }
  const { issues } = whole.error
  const faults = new Map(
    issues.filter(({ path }) => isTyped(typed, path)).map((issue) => [pointer(issue), issueText(issue)]),
  )
  const { rest, places, leftOut } = withoutRows(typed, issues)
  const part = schema.safeParse(rest)
  return part.success
    ? { status: 'complete', inputs: part.data, places, leftOut, faults }
    : { status: 'incomplete', faults }
}

function inputsOf(procedure: RecordableProcedure): z.ZodType {
  const option = recordTestBody.options.find(({ shape }) => shape.procedure.value === procedure)
  if (!option) throw new Error(`No test is called ${procedure}.`)
  return option.shape.inputs
}

type Issue = z.core.$ZodIssue

const pointer = ({ path }: Issue) => ['inputs', ...path.map(String)].join('/')

/** Something stands at the place: an empty field, an empty list and a missing one are not typed yet. */
function isTyped(typed: unknown, path: readonly PropertyKey[]): boolean {
  const value = path.reduce<unknown>(
    (part, name) => (part as Record<PropertyKey, unknown> | null | undefined)?.[name],
    typed,
  )
  return typeof value === 'number' || (typeof value === 'string' && value !== '')
}

function withoutRows(typed: unknown, issues: readonly Issue[]) {
  const rest = { ...(typed as Record<string, unknown>) }
  const places: Record<string, number[]> = {}
  let leftOut = 0
  for (const [name, rows] of Object.entries(rest)) {
    if (!Array.isArray(rows)) continue
    const bad = new Set(issues.filter(({ path }) => path[0] === name).map(({ path }) => path[1]))
    const kept = rows.flatMap((_, place) => (bad.has(place) ? [] : [place]))
    places[name] = kept
    leftOut += rows.length - kept.length
    rest[name] = kept.map((place) => (rows as unknown[])[place])
  }
  return { rest, places, leftOut }
}
