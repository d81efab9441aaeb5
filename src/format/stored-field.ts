/**
 * Inputs, results and limits are stored under names that end in their unit: `peakC`, `minutesAtLoad`, `maxSwr`. This
 * turns such a name into words and a unit, so that any test can be shown whole, whatever its procedure.
 */
export interface FieldName {
  readonly label: string
  readonly unit: string
  /** Multiplies the stored number: fractions are shown as per cent. */
  readonly factor: number
}

const UNITS: readonly (readonly [RegExp, string, number])[] = [
  [/KPerW$/, 'K/W', 1],
  [/KPerMin$/, 'K/min', 1],
  [/KPerS$/, 'K/s', 1],
  [/MHz$/, 'MHz', 1],
  [/KHz$/, 'kHz', 1],
  [/Hz$/, 'Hz', 1],
  [/Db$/, 'dB', 1],
  [/Ohms?$/, 'Ω', 1],
  [/Wh$/, 'Wh', 1],
  [/Ah$/, 'Ah', 1],
  [/Percent$/, '%', 1],
  [/Fraction$/, '%', 100],
  [/Minutes?$/, 'min', 1],
  [/Seconds$/, 's', 1],
  [/Hours$/, 'h', 1],
  [/Months$/, 'months', 1],
  [/Days$/, 'days', 1],
  [/(?<=[a-z])AtS$/, 's', 1],
  [/(?<=[a-z])C$/, '°C', 1],
  [/(?<=[a-z])K$/, 'K', 1],
  [/(?<=[a-z])W$/, 'W', 1],
  [/(?<=[a-z])V$/, 'V', 1],
  [/(?<=[a-z])A$/, 'A', 1],
  [/(?<=[a-z])S$/, 's', 1],
  [/(?<=[a-z])M$/, 'm', 1],
]

const WHOLE: Readonly<Record<string, FieldName>> = {
  efficiency: { label: 'Efficiency', unit: '%', factor: 100 },
  minEfficiency: { label: 'Least efficiency', unit: '%', factor: 100 },
  hours: { label: 'Hours', unit: 'h', factor: 1 },
  minutes: { label: 'Minutes', unit: 'min', factor: 1 },
  atS: { label: 'At', unit: 's', factor: 1 },
  swr: { label: 'SWR', unit: '', factor: 1 },
  watts: { label: 'Power', unit: 'W', factor: 1 },
  fit: { label: 'Fitted curve', unit: '', factor: 1 },
  firstC: { label: 'First reading', unit: '°C', factor: 1 },
  lastC: { label: 'Last reading', unit: '°C', factor: 1 },
  curveStartC: { label: 'Curve begins at', unit: '°C', factor: 1 },
  start: { label: 'Begins at', unit: '', factor: 1 },
  identifiable: { label: 'Log long enough', unit: '', factor: 1 },
  rmseK: { label: 'Scatter about the curve', unit: 'K', factor: 1 },
  tauS: { label: 'Time constant', unit: 's', factor: 1 },
  tauLowS: { label: 'Time constant, low', unit: 's', factor: 1 },
  tauHighS: { label: 'Time constant, high', unit: 's', factor: 1 },
  resistance: { label: 'Thermal resistance', unit: '', factor: 1 },
  kPerW: { label: 'Value', unit: 'K/W', factor: 1 },
}

const SPELLINGS: readonly (readonly [RegExp, string])[] = [
  [/\bswr\b/gi, 'SWR'],
  [/\brf\b/gi, 'RF'],
  [/\brms\b/gi, 'RMS'],
  [/^max\b/i, 'Most'],
  [/^min\b/i, 'Least'],
]

export function fieldName(name: string): FieldName {
  const known = WHOLE[name]
  if (known) return known
  const found = UNITS.find(([ending]) => ending.test(name))
  const bare = found ? name.replace(found[0], '') : name
  return { label: wordsOf(bare || name), unit: found?.[1] ?? '', factor: found?.[2] ?? 1 }
}

/** `minutesAtLoad` is "Minutes at load". */
function wordsOf(name: string): string {
  const spaced = name.replace(/([a-z0-9])([A-Z])/g, '$1 $2').toLowerCase()
  const capital = spaced.charAt(0).toUpperCase() + spaced.slice(1)
  return SPELLINGS.reduce((text, [pattern, spelling]) => text.replace(pattern, spelling), capital)
}
