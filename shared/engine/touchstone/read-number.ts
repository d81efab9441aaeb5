/**
 * A decimal number in full, or undefined: hexadecimal, `inf`, `nan`, a decimal comma and numbers beyond a
 * double are refused. Reads `text` from `from` up to `to`.
 *
 * Nearly every token of a file is a plain decimal of up to 15 digits. Its digits as an integer and the power
 * of ten are then both exact doubles, so one division gives the correctly rounded value, the same as
 * `Number` does in a third of the time. Everything else goes to `Number`.
 */
export function readNumber(text: string, from: number, to: number): number | undefined {
  return readPlainDecimal(text, from, to) ?? readAnyDecimal(text, from, to)
}

const MAX_EXACT_DIGITS = 15
const POWERS_OF_TEN = Array.from({ length: MAX_EXACT_DIGITS + 1 }, (_, digits) => 10 ** digits)
const PLUS = 43
const MINUS = 45
const POINT = 46
const ZERO = 48
const NINE = 57

function readPlainDecimal(text: string, from: number, to: number): number | undefined {
  const sign = text.charCodeAt(from)
  const start = sign === MINUS || sign === PLUS ? from + 1 : from
  let digits = 0
  let pointAt = -1
  for (let at = start; at < to; at++) {
    const code = text.charCodeAt(at)
    if (code >= ZERO && code <= NINE) digits = digits * 10 + (code - ZERO)
    else if (code === POINT && pointAt < 0) pointAt = at
    else return undefined
  }
  const count = to - start - (pointAt < 0 ? 0 : 1)
  if (count < 1 || count > MAX_EXACT_DIGITS) return undefined
  const value = pointAt < 0 ? digits : digits / (POWERS_OF_TEN[to - pointAt - 1] as number)
  return sign === MINUS ? -value : value
}

function readAnyDecimal(text: string, from: number, to: number): number | undefined {
  for (let at = from; at < to; at++) {
    if (!isNumberPart(text.charCodeAt(at))) return undefined
  }
  const value = from < to ? Number(text.slice(from, to)) : NaN
  return Number.isFinite(value) ? value : undefined
}

/** Digits, point, signs and the exponent letter; `Number` then judges their order. */
function isNumberPart(code: number): boolean {
  if (code >= ZERO && code <= NINE) return true
  return code === POINT || code === MINUS || code === PLUS || code === 101 || code === 69
}
