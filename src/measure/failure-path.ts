import type { RecordableProcedure } from '#shared/contracts/record-test.ts'
import type { Failure } from '#shared/engine/outcome.ts'
import { INPUT_ROWS } from '#shared/engine/procedures/input-rows.ts'

/** The path of the field that the engine found at fault, as the service would name it; null: it named none. */
export function failurePath(
  procedure: RecordableProcedure,
  { field, line }: Failure,
  places: Readonly<Record<string, readonly number[]>>,
): string | null {
  const rows = INPUT_ROWS[procedure]
  const row = line === undefined || rows === undefined ? [] : [rows, places[rows]?.[line - 1] ?? line - 1]
  const parts = [...row, ...(field === undefined ? [] : [field])]
  return parts.length === 0 ? null : ['inputs', ...parts].join('/')
}
