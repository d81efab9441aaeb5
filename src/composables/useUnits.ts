import { computed } from 'vue'
import { quantityText, switchOf, type Units } from '@/format/quantity.ts'
import { useSessionStore } from '@/stores/session.ts'

/**
 * Quantities in the units that the member chose. Values are kept in °C, K and m; `shown` and `stored` convert one
 * value, and `text` writes it with its unit: `text(85, '°C')` is "85 °C" or "185 °F".
 */
export function useUnits() {
  const session = useSessionStore()
  const units = computed<Units>(() => ({
    temperature: session.member?.units.temperature ?? 'C',
    length: session.member?.units.length ?? 'm',
  }))

  return {
    units,
    /** The unit that a stored unit is shown in: `unitOf('°C')`. */
    unitOf: (unit: string) => switchOf(unit, units.value).unit,
    shown: (stored: number, unit: string) => switchOf(unit, units.value).shown(stored),
    stored: (shown: number, unit: string) => switchOf(unit, units.value).stored(shown),
    text(value: number, unit: string, digits = 1): string {
      const change = switchOf(unit, units.value)
      return quantityText(change.shown(value), change.unit, digits)
    },
  }
}
