import { limitsOf, type LimitsByProcedure } from '#shared/engine/policy/limits.ts'
import type { Band, Procedure } from '#shared/engine/vocabulary.ts'

/** What a figure was judged against, as a number in its unit. */
export interface FigureLimit {
  readonly value: number
  /** The side that fails. */
  readonly not: 'above' | 'below'
}

interface Judged {
  readonly procedure: Procedure
  /** Of the rule in force on the day; null: no rule asked, and the limits that every group begins with were used. */
  readonly limits: Readonly<Record<string, unknown>> | null
  /** Feedlines: loss that later tests are judged from, dB by band. */
  readonly baselineDb?: Readonly<Partial<Record<Band, number>>>
}

interface Figure {
  readonly band: Band | null
  readonly measure: string
  readonly powerW: number | null
}

const LIMITS: Readonly<Record<string, (figure: Figure, judged: Judged) => FigureLimit | null>> = {
  efficiency: (_, judged) =>
    least(of(judged.procedure === 'open-short-load' ? 'open-short-load' : 'pair-loss', judged).minEfficiency),
  peakC: (_, judged) => most(of('heat-test', judged).maxC),
  swrChange: (_, judged) => most(of('heat-test', judged).maxSwrChange),
  swr: (_, judged) => most(of('antenna-sweep', judged).maxSwr),
  capacityFraction: (_, judged) => least(of('battery-capacity', judged).minCapacityFraction),
  watts: ({ powerW }, judged) => least((powerW ?? 0) * of('radio-check', judged).minPowerFraction),
  lossDb: ({ band }, judged) => {
    const base = band ? judged.baselineDb?.[band] : undefined
    // Binary fractions: 1.4 + 0.8 is shown as the 2.2 that it was judged as.
    return base === undefined ? null : most(Number((base + of('feedline-loss', judged).maxRiseDb).toFixed(6)))
  },
}

/** Null where a figure has no limit, such as the first loss of a feedline. */
export function figureLimit(figure: Figure, judged: Judged): FigureLimit | null {
  return LIMITS[figure.measure]?.(figure, judged) ?? null
}

function of<P extends keyof LimitsByProcedure>(procedure: P, { limits }: Judged): LimitsByProcedure[P] {
  return limitsOf(procedure, limits ? { limits } : undefined)
}

const most = (value: number | undefined) => (value === undefined ? null : ({ value, not: 'above' } as const))
const least = (value: number | undefined) => (value === undefined ? null : ({ value, not: 'below' } as const))
