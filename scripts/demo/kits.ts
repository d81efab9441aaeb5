import type { KindCode } from './kit-kinds.ts'
import type { PlaceKey } from './places.ts'

/** Kits of the scenario, section 6: kind and home. */
export interface DemoKit {
  readonly designation: string
  readonly kind: KindCode
  readonly home: PlaceKey
}

const kit = (number: string, kind: KindCode, home: PlaceKey): DemoKit => ({
  designation: `K-${number}`,
  kind,
  home,
})

export const KITS: readonly DemoKit[] = [
  kit('01', 'HF-E', 'P1'),
  kit('02', 'HF-E', 'P1'),
  kit('03', 'HF-E', 'P1'),
  kit('04', 'HF-E', 'P1'),
  kit('05', 'HF-E', 'P3'),
  kit('06', 'HF-E', 'P2'),
  kit('07', 'HF-E', 'P2'),
  kit('08', 'HF-E', 'P2'),
  kit('09', 'VU', 'P1'),
  kit('10', 'VU', 'P1'),
  kit('11', 'VU', 'P3'),
  kit('12', 'VU', 'P3'),
  kit('13', 'VU', 'P2'),
  kit('14', 'VU', 'P2'),
  kit('15', 'VU', 'P3'),
  kit('16', 'DG', 'P1'),
  kit('17', 'DG', 'P1'),
  kit('18', 'DG', 'P3'),
  kit('19', 'XB', 'P1'),
  kit('20', 'XB', 'P3'),
  kit('21', 'PW', 'P1'),
  kit('22', 'PW', 'P2'),
  kit('23', 'TB', 'P1'),
  kit('24', 'TB', 'P3'),
]

/** 'K-07' -> '07'. */
export const numberOf = (designation: string) => designation.slice(designation.indexOf('-') + 1)

export function kitOf(designation: string): DemoKit {
  const found = KITS.find((one) => one.designation === designation)
  if (!found) throw new Error(`The demo has no kit ${designation}`)
  return found
}
