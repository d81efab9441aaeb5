import type { Construction } from '#shared/engine/builds/winding-length.ts'

type Typed = number | string | null

/** What is typed of a winding card, before the contract has checked it. */
export interface WindingDraft {
  construction?: Construction | null
  awg?: Typed
  meanTurnMm?: Typed
  tailMm?: Typed
  tap?: string | null
  materialsCost?: Typed
  currency?: string | null
  cautions?: string
}

const LABELS: Readonly<Record<keyof WindingDraft, string>> = {
  construction: 'Made as',
  awg: 'Wire gauge',
  meanTurnMm: 'Mean length of a turn',
  tailMm: 'Tail at each end',
  tap: 'Tap',
  materialsCost: 'Cost of materials',
  currency: 'Currency',
  cautions: 'Cautions of its own',
}

/** By its labels, as two versions are laid side by side. */
export function describeWinding(winding: WindingDraft): Record<string, string> {
  return Object.fromEntries(
    Object.entries(LABELS).map(([name, label]) => [label, String(winding[name as keyof WindingDraft] ?? '')]),
  )
}
