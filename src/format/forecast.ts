import type { ResponseOf } from '#shared/contracts/endpoint.ts'
import type { readForecast } from '#shared/contracts/forecast.ts'
import type { Span } from './horizon.ts'

export type ForecastAnswer = ResponseOf<typeof readForecast>
export type VerdictTally = ForecastAnswer['start']

export const canGo = (tally: VerdictTally): number => tally.proven + tally['proven-with-limits']

/** A stretch of the forecast with one tally, as shares of the span in percent. */
export interface TallyStretch {
  readonly from: number
  readonly to: number
  readonly tally: VerdictTally
}

export function tallyStretches({ from, to, start, steps }: ForecastAnswer): TallyStretch[] {
  const { fromMs, toMs } = spanOf({ from, to })
  const share = (at: string) => ((Date.parse(at) - fromMs) / (toMs - fromMs)) * 100
  const marks = [{ at: from, tally: start }, ...steps]
  return marks.map(({ at, tally }, place) => {
    return { from: share(at), to: share(marks[place + 1]?.at ?? to), tally }
  })
}

export function spanOf({ from, to }: Pick<ForecastAnswer, 'from' | 'to'>): Span {
  return { fromMs: Date.parse(from), toMs: Date.parse(to) }
}

/** The outline of a stepped area from `floor` up to `top`, in percent of the width and in stations of height. */
export function stepArea(
  stretches: readonly TallyStretch[],
  floor: (tally: VerdictTally) => number,
  top: (tally: VerdictTally) => number,
): string {
  const up = stretches.flatMap(({ from, to, tally }) => [
    [from, top(tally)],
    [to, top(tally)],
  ])
  const down = stretches.flatMap(({ from, to, tally }) => [
    [from, floor(tally)],
    [to, floor(tally)],
  ])
  return [...up, ...down.reverse()].map(([x, y]) => `${round(x!)},${y}`).join(' ')
}

const round = (value: number) => Math.round(value * 100) / 100

export interface Turn {
  readonly at: string
  readonly left: number
}

/** The step that takes most stations away, if any takes one. */
export function worstStep(answer: ForecastAnswer): (Turn & { readonly lost: number }) | null {
  let before = canGo(answer.start)
  let worst: (Turn & { lost: number }) | null = null
  for (const { at, tally } of answer.steps) {
    const lost = before - canGo(tally)
    if (lost > (worst?.lost ?? 0)) worst = { at, lost, left: canGo(tally) }
    before = canGo(tally)
  }
  return worst
}

/** From when on no station can go any more. */
export function emptyFrom({ steps }: ForecastAnswer): string | null {
  const last = steps.findLastIndex(({ tally }) => canGo(tally) > 0)
  return steps[last + 1]?.at ?? null
}
