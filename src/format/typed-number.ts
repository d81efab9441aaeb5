/**
 * A number as people type it: a comma may stand for the point, a true minus for the hyphen. Nothing typed is null;
 * what is no number comes back as it is.
 */
export function typedNumber(typed: string): number | string | null {
  const text = typed.trim().replace(',', '.').replace('\u2212', '-')
  if (text === '') return null
  return /^[-+]?(?:\d+\.?\d*|\.\d+)$/.test(text) ? Number(text) : typed
}

/** A number as it is put into a field: plain digits, no trailing zeros. */
export function editableNumber(value: number, digits: number): string {
  return String(Number(value.toFixed(digits)))
}
