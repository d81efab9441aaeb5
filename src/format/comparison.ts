import type { compareBuildSheets } from '#shared/contracts/build-figures.ts'
import type { ResponseOf } from '#shared/contracts/endpoint.ts'
import { listText } from '#shared/engine/plain-words.ts'
import { numberText, quantityText } from './quantity.ts'

type Comparison = ResponseOf<typeof compareBuildSheets>

/** What a comparison says, the verdict first: who is best, what is unusable, whether heat agrees, what is left out. */
export function comparisonSentences(comparison: Comparison): string[] {
  const { builds, notes, leftOut } = comparison
  return [
    ...firstOf(builds),
    ...builds.flatMap((build) => unusableOf(build, comparison.unusableAboveDb)),
    ...heatOf(comparison),
    ...notes,
    ...(builds.length > 0 ? leftOut.map(({ name }) => `${name} has no measured unit to compare.`) : []),
  ]
}

function firstOf(builds: Comparison['builds']): string[] {
  const first = builds.filter(({ rank }) => rank === 1)
  const [best] = first
  if (!best) return []
  const names = listText(first.map(({ sheet }) => sheet.name))
  return [`First overall: ${names}, ${db(best.meanLossDb)} lost on the mean of the bands.`]
}

function unusableOf(
  { sheet, unusableBands, meanLossDb, meanWithoutWorstDb, worstBand }: Comparison['builds'][number],
  limitDb: number,
): string[] {
  if (unusableBands.length === 0) return []
  const without =
    meanWithoutWorstDb === null
      ? ''
      : ` Its mean is ${db(meanLossDb)}, and ${db(meanWithoutWorstDb)} without ${worstBand}.`
  return [
    `${sheet.name} is unusable on ${listText(unusableBands)}: more than ${quantityText(limitDb, 'dB', 1)} is lost there.${without}`,
  ]
}

const db = (lossDb: number) => `${numberText(lossDb, 3, true)}\u00a0dB`

const HEAT = {
  agrees: 'the build that loses less also warms less, which is what one should see',
  disagrees: 'the build that loses less warms more: look at both tests again',
} as const

/** Two temperatures tell no end temperature, and none is claimed. */
function heatOf({ heat, builds }: Comparison): string[] {
  if (heat.verdict === 'not-compared' || !heat.run) {
    return builds.length > 1
      ? ['Heat is not compared: the builds have no run of the same band, power and time.']
      : []
  }
  const { band, powerW, minutes } = heat.run
  const run = `${quantityText(minutes, 'min', 1)} at ${quantityText(powerW, 'W', 0)} on ${band}`
  return [`By the rise after ${run}, ${HEAT[heat.verdict]}. It says nothing about the end temperature.`]
}
