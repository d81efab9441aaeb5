/** Small conversions between rows and answers. */

export function instant(at: Date): string
export function instant(at: Date | null): string | null
export function instant(at: Date | null): string | null {
  return at?.toISOString() ?? null
}

/** A numeric column, which arrives as text, as a number. */
export function number(value: string | null): number | null {
  return value === null ? null : Number(value)
}

/** A number as a numeric column of that scale returns it. */
export function numeric(value: number | null, scale: number): string | null {
  return value === null ? null : value.toFixed(scale)
}

export function namedOf(id: string | null, name: string | null): { id: string; name: string } | null {
  return id === null || name === null ? null : { id, name }
}

export function designatedOf(
  id: string | null,
  designation: string | null,
): { id: string; designation: string } | null {
  return id === null || designation === null ? null : { id, designation }
}

/** The columns that every registry row answers with. */
export const RECORD_COLUMNS = `t.version, t.created_at, t.retired_at, t.retired_reason`

export interface RecordColumns {
  version: number
  created_at: Date
  retired_at: Date | null
  retired_reason: string | null
}

export function recordFieldsOf(row: RecordColumns) {
  return {
    version: row.version,
    createdAt: instant(row.created_at),
    retiredAt: instant(row.retired_at),
    retiredReason: row.retired_reason,
  }
}
