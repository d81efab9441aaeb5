/** Why a thermometer's log says nothing about the end temperature, in words. Source: calculation sheet, section 6. */
import type { NotIdentifiable } from './heat-fit.ts'

const BECAUSE: Readonly<Record<NotIdentifiable, string>> = {
  'too-few-readings': 'it has too few readings',
  'straight-line-fits': 'a straight line fits it as well as a curve',
  'no-upper-end': 'it sets no upper end to the time constant',
  'interval-too-wide': 'it leaves the time constant uncertain by more than itself',
}

/** `it has too few readings, a straight line fits it as well as a curve`. */
export function whyTooShort(because: readonly NotIdentifiable[]): string {
  return because.map((reason) => BECAUSE[reason]).join(', ')
}
