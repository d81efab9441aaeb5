import { numberText, quantityText } from './quantity.ts'

type UnitText = (value: number, unit: string, digits?: number) => string

const LINES: Readonly<Record<string, (value: number, text: UnitText) => string>> = {
  powerW: (value) => quantityText(value, 'W'),
  minutes: (value) => quantityText(value, 'min'),
  maxC: (value, text) => `${text(value, '°C', 0)} at most`,
  maxSwrChange: (value) => `SWR moving no more than ${numberText(value)}`,
  minEfficiency: (value) => `${quantityText(value * 100, '%')} efficiency or more`,
  maxSwr: (value) => `SWR ${numberText(value)} or less`,
  maxRiseDb: (value) => `no more than ${quantityText(value, 'dB')} over its baseline`,
  minCapacityFraction: (value) => `${quantityText(value * 100, '%')} of the rating or more`,
  minPowerFraction: (value) => `${quantityText(value * 100, '%')} of the power setting or more`,
  voiceOnlyAfterMonths: (value) => `voice only after ${quantityText(value, 'months')}`,
}

/** The limits of a rule in words, in the order in which the rule gives them. */
export function limitLines(limits: Readonly<Record<string, unknown>>, text: UnitText): string[] {
  return Object.entries(limits).flatMap(([name, value]) =>
    typeof value === 'number' && LINES[name] ? [LINES[name](value, text)] : [],
  )
}

/** The limits of a rule as labels of a form. */
export const LIMIT_WORDS: Readonly<Record<string, { readonly label: string; readonly unit?: string }>> = {
  powerW: { label: 'Carrier', unit: 'W' },
  minutes: { label: 'Keyed for', unit: 'min' },
  maxC: { label: 'Stop at', unit: '°C' },
  maxSwrChange: { label: 'SWR may move by' },
  minEfficiency: { label: 'Efficiency at least', unit: '0 to 1' },
  maxSwr: { label: 'SWR at most' },
  maxRiseDb: { label: 'Loss over its baseline at most', unit: 'dB' },
  minCapacityFraction: { label: 'Capacity at least', unit: '0 to 1 of the rating' },
  minPowerFraction: { label: 'Power at least', unit: '0 to 1 of the setting' },
  voiceOnlyAfterMonths: { label: 'Voice only after', unit: 'months' },
}
