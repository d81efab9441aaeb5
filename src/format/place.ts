interface Temperatures {
  readonly minC: number | null
  readonly maxC: number | null
}

type QuantityWriter = (value: number, unit: string, digits?: number) => string

/** `−8 °C to 34 °C` in the member's unit; one end where only that is known, empty where neither is. */
export function temperatureRange({ minC, maxC }: Temperatures, text: QuantityWriter): string {
  if (minC !== null && maxC !== null) return `${text(minC, '°C')} to ${text(maxC, '°C')}`
  if (minC !== null) return `${text(minC, '°C')} or more`
  return maxC === null ? '' : `${text(maxC, '°C')} or less`
}
