import type { ReflectionSweep } from '#shared/engine/reflection-sweep.ts'

/**
 * The sweeps of the calculation sheet, section 7: `Z(f) = R + j R Q (f/f0 - f0/f)`, 6.80 to 7.50 MHz by
 * 0.05, as reflections in 50 ohm.
 */
export function seriesAntenna(r: number, q: number, f0Mhz: number): ReflectionSweep {
  const points = Array.from({ length: 15 }, (_, i) => {
    const frequencyHz = 6_800_000 + 50_000 * i
    const f = frequencyHz / 1e6
    const x = r * q * (f / f0Mhz - f0Mhz / f)
    const below = (r + 50) ** 2 + x * x
    return { frequencyHz, gamma: { re: (r * r - 2500 + x * x) / below, im: (100 * x) / below } }
  })
  return { referenceOhm: 50, points }
}

export const BASELINE = seriesAntenna(45, 11, 7.12)
export const NEW_SWEEP = seriesAntenna(52, 10, 7.03)
