import { numberText } from '@/format/quantity.ts'
import type { Scale } from './scale.ts'
import type { Ticks } from './ticks.ts'

/** A number of an axis and where it stands, px. */
export interface AxisTick {
  readonly at: number
  readonly label: string
}

export function axisTicks({ values, digits }: Ticks, scale: Scale): AxisTick[] {
  return values.map((value) => ({ at: scale(value), label: numberText(value, digits, true) }))
}
