import type { FileFacts } from '@/measure/questions.ts'
import { numberText } from './quantity.ts'

/** `1 port, 201 points, 3 to 30 MHz, 50 Ω`. */
export function fileFactsText({ ports, points, fromHz, toHz, referenceOhm }: FileFacts): string {
  const range = `${numberText(fromHz / 1e6, 3)} to ${numberText(toHz / 1e6, 3)}\u00a0MHz`
  const references = [...new Set(referenceOhm)].map((ohm) => numberText(ohm, 1)).join(' and ')
  return [
    ports === 1 ? '1 port' : '2 ports',
    points === 1 ? '1 point' : `${points.toLocaleString('en-US')} points`,
    range,
    `${references}\u00a0Ω`,
  ].join(', ')
}
