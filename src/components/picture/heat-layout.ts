import { axisTicks, type AxisTick } from '@/components/chart/axis-tick.ts'
import type { Point } from '@/components/chart/paths.ts'
import { extentOf, linearScale } from '@/components/chart/scale.ts'
import { roundAxis, ticksBetween } from '@/components/chart/ticks.ts'
import { quantityText } from '@/format/quantity.ts'
import type { HeatPicture } from './heat-picture.ts'

interface Place {
  readonly width: number
  readonly height: number
  readonly narrow: boolean
}

interface Moment {
  readonly x: number
  readonly top: number
  /** Its words stand before it. */
  readonly before: boolean
}

export interface HeatLayout {
  readonly left: number
  readonly right: number
  readonly foot: number
  readonly yTicks: readonly AxisTick[]
  readonly xTicks: readonly AxisTick[]
  readonly limitY: number
  readonly keyUp: Moment
  /** The time that the rule asks for, where the key came up at another. */
  readonly asked: Moment | null
  readonly marks: readonly { x: number; y: number; keyed: boolean; said: string }[]
  readonly cooling: readonly Point[]
  readonly curve: {
    readonly upper: readonly Point[]
    readonly lower: readonly Point[]
    readonly within: readonly Point[]
    readonly beyond: readonly Point[]
  } | null
  /** Where the curve ends: above the picture, or within it and then with its interval. */
  readonly end: {
    readonly x: number
    readonly y: number
    readonly endC: number
    readonly spread: { readonly low: number; readonly high: number } | null
  } | null
}

/** Words at the top of a moment need this much, px. */
const WORDS = 120
const beside = (distance: number) => Math.abs(distance) > WORDS

/** Where everything of a heat test stands; `shown` turns deg C into the member's degrees. */
export function heatLayout(
  picture: HeatPicture,
  place: Place,
  shown: (celsius: number) => number,
): HeatLayout {
  const { inputs, limits, curve, untilS } = picture
  const { readings, keyUpAtS } = inputs
  const [left, right] = [place.narrow ? 44 : 48, place.width - 10]
  const [top, foot] = [44, place.height - (place.narrow ? 56 : 48)]
  const axis = roundAxis(lowest(picture, shown), highest(picture, shown), 7)
  const y = linearScale(axis, foot, top)
  const x = linearScale({ low: 0, high: untilS }, left, right)
  const point = (atS: number, celsius: number): Point => [
    x(atS),
    y(Math.min(Math.max(shown(celsius), axis.low), axis.high)),
  ]
  const askedS = limits.minutes * 60
  const before = (atS: number) => x(atS) > right - WORDS
  return {
    left,
    right,
    foot,
    yTicks: axisTicks(axis, y),
    xTicks: axisTicks(ticksBetween(0, untilS / 60, place.narrow ? 5 : 10), (minutes) => x(minutes * 60)),
    limitY: y(shown(limits.maxC)),
    keyUp: { x: x(keyUpAtS), top: top - 24, before: before(keyUpAtS) },
    asked:
      Math.abs(askedS - keyUpAtS) < 10
        ? null
        : { x: x(askedS), top: top - (beside(x(askedS) - x(keyUpAtS)) ? 24 : 6), before: before(askedS) },
    marks: readings.map(({ atS, temperatureC }) => ({
      x: x(atS),
      y: y(shown(temperatureC)),
      keyed: atS <= keyUpAtS,
      said: `${quantityText(atS / 60, 'min', 1)}: ${quantityText(shown(temperatureC), '°', 1)}`,
    })),
    cooling: readings
      .filter(({ atS }) => atS >= keyUpAtS)
      .map(({ atS, temperatureC }) => point(atS, temperatureC)),
    curve: curve && curvePoints(curve, keyUpAtS, { point, below: shown, ceiling: axis.high }),
    end: endOf(picture, { right, top: top + (place.narrow ? 14 : 0), ceiling: axis.high, y }, shown),
  }
}

interface Drawing {
  readonly point: (atS: number, celsius: number) => Point
  readonly below: (celsius: number) => number
  readonly ceiling: number
}

/** The curve up to the upper edge of the picture, parted where the key came up. */
function curvePoints(
  curve: NonNullable<HeatPicture['curve']>,
  keyUpAtS: number,
  { point, below, ceiling }: Drawing,
) {
  const drawn = curve.filter(({ lowC }) => below(lowC) <= ceiling)
  const middle = drawn.filter(({ bestC }) => below(bestC) <= ceiling)
  const turn = middle.findIndex(({ atS }) => atS > keyUpAtS)
  const within = turn < 0 ? middle : middle.slice(0, turn + 1)
  return {
    upper: drawn.map(({ atS, highC }) => point(atS, highC)),
    lower: drawn.map(({ atS, lowC }) => point(atS, lowC)),
    within: within.map(({ atS, bestC }) => point(atS, bestC)),
    beyond: turn < 0 ? [] : middle.slice(turn).map(({ atS, bestC }) => point(atS, bestC)),
  }
}

function lowest({ inputs }: HeatPicture, shown: (celsius: number) => number): number {
  return extentOf([inputs.ambientC, ...inputs.readings.map((one) => one.temperatureC)].map(shown))?.low ?? 0
}

/** The limit, every reading and the best curve, with room over it for the words of its end. */
function highest({ inputs, limits, curve }: HeatPicture, shown: (celsius: number) => number): number {
  const ends = (curve ?? []).map(({ bestC }) => bestC).filter((celsius) => celsius < limits.maxC * 1.4)
  const read = inputs.readings.map(({ temperatureC }) => temperatureC)
  const range = extentOf([...read, limits.maxC * 1.06, ...ends].map(shown)) ?? { low: 0, high: 100 }
  return range.high + (curve ? (range.high - range.low) * 0.12 : 0)
}

interface EndPlace {
  readonly right: number
  readonly top: number
  readonly ceiling: number
  readonly y: (shown: number) => number
}

function endOf({ fit, inputs }: HeatPicture, place: EndPlace, shown: (celsius: number) => number) {
  if (!('identifiable' in fit) || !fit.identifiable) return null
  const { ambientC } = inputs
  const [endC, lowC, highC] = [fit.steadyRiseK, fit.steadyRiseLowK, fit.steadyRiseHighK].map(
    (riseK) => ambientC + riseK,
  ) as [number, number, number]
  const x = place.right - 8
  if (shown(endC) > place.ceiling) return { x, y: place.top, endC, spread: null }
  const at = (celsius: number) => place.y(Math.min(shown(celsius), place.ceiling))
  return { x, y: at(endC), endC, spread: { low: at(lowC), high: at(highC) } }
}
