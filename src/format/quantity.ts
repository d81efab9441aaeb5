import {
  celsiusFromFahrenheit,
  fahrenheitDifferenceFromKelvin,
  fahrenheitFromCelsius,
  feetFromMetres,
  kelvinFromFahrenheitDifference,
  metresFromFeet,
} from '#shared/engine/units.ts'

/** What a member chose to read and type: temperatures and lengths. Everything else has one unit for all. */
export interface Units {
  readonly temperature: 'C' | 'F'
  readonly length: 'm' | 'ft'
}

/** Units that change with the member's choice; `K` is a difference or rise of temperature. */
export type SwitchedUnit = '°C' | 'K' | 'm'

interface Switch {
  readonly unit: string
  readonly shown: (stored: number) => number
  readonly stored: (shown: number) => number
}

const same = (value: number) => value

const SWITCHES: Readonly<Record<string, (units: Units) => Switch>> = {
  '°C': ({ temperature }) =>
    temperature === 'F'
      ? { unit: '°F', shown: fahrenheitFromCelsius, stored: celsiusFromFahrenheit }
      : { unit: '°C', shown: same, stored: same },
  K: ({ temperature }) =>
    temperature === 'F'
      ? { unit: '°F', shown: fahrenheitDifferenceFromKelvin, stored: kelvinFromFahrenheitDifference }
      : { unit: 'K', shown: same, stored: same },
  m: ({ length }) =>
    length === 'ft'
      ? { unit: 'ft', shown: feetFromMetres, stored: metresFromFeet }
      : { unit: 'm', shown: same, stored: same },
}

/** How a quantity stored in `unit` is shown to and taken from a member. Units that do not switch pass through. */
export function switchOf(unit: string, units: Units): Switch {
  return SWITCHES[unit]?.(units) ?? { unit, shown: same, stored: same }
}

/** A number with at most `digits` decimals and a true minus sign; trailing zeros are kept only when `fixed`. */
export function numberText(value: number, digits = 1, fixed = false): string {
  const text = value.toFixed(digits)
  const short = fixed || digits === 0 ? text : text.replace(/\.?0+$/, '')
  return (Number(short) === 0 ? short.replace('-', '') : short).replace('-', '\u2212')
}

/** `85 W`, `12.1 h`, `185 °F`: number, unbreakable space, unit. */
export function quantityText(value: number, unit: string, digits = 1): string {
  return `${numberText(value, digits)}\u00a0${unit}`
}
