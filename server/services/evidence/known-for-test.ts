import { cableKeyOf } from '#shared/engine/feedline-cable-name.ts'
import type { Accuracy } from '#shared/engine/procedures/accuracy.ts'
import { DEFAULT_REGION } from '#shared/engine/procedures/judged-bands.ts'
import type { FeedlineHistory, LineFacts } from '#shared/engine/procedures/line-history.ts'
import type { KnownForTest, TransformerFacts } from '#shared/engine/procedures/performance.ts'
import type { SweepBaseline } from '#shared/engine/procedures/sweep-baseline.ts'
import type { Policy, Rule } from '#shared/engine/readiness/types.ts'
import { BANDS, type Band, type Chemistry } from '#shared/engine/vocabulary.ts'
import type { BaselineRow, EfficiencyRow, FeedlineRow, TestHistory } from './test-history.ts'
import type { TestSubject } from './test-subject.ts'

interface Parts {
  readonly subject: TestSubject
  readonly history: TestHistory
  readonly policy: Policy
  readonly rule: Rule | undefined
  readonly accuracy: Accuracy | null
}

type Details = Readonly<Record<string, unknown>>

/** What the finding of a test depends on besides its inputs, out of the records of its day. */
export function knownForTest({ subject, history, policy, rule, accuracy }: Parts): KnownForTest {
  const { details, facts } = subject
  return {
    rule,
    instrument: accuracy,
    battery: {
      ...(facts.ratedAh !== undefined && { ratedAh: facts.ratedAh }),
      ...(facts.chemistry !== undefined && { chemistry: facts.chemistry as Chemistry }),
    },
    feedline: feedlineHistory(history.feedline, details),
    line: lineFacts(details),
    transformer: transformerFacts(details, history.efficiency),
    references: history.references,
    sweep: { baseline: history.baseline && sweepBaseline(history.baseline) },
    region: policy.settings.bandRegion ?? DEFAULT_REGION,
    plan: history.plan,
  }
}

/** The baseline of a band: of the newest test that set one, else as entered for the item, else the first test. */
function feedlineHistory(rows: readonly FeedlineRow[], details: Details): FeedlineHistory {
  const setting = rows.filter((row) => row.sets_baseline)
  const entered = numberIn(details, 'baselineDb')
  const found = BANDS.map((band) => {
    const set = readingsOf(setting, band).at(-1)
    const first = readingsOf(rows, band)[0]
    const swr = set?.swrAtRadio ?? (entered === undefined ? first?.swrAtRadio : undefined)
    return { band, lossDb: set?.lossDb ?? entered ?? first?.lossDb, swr }
  })
  return {
    baselineDb: Object.fromEntries(
      found.flatMap(({ band, lossDb }) => (lossDb === undefined ? [] : [[band, lossDb]])),
    ),
    baselineSwr: Object.fromEntries(
      found.flatMap(({ band, swr }) => (swr === undefined ? [] : [[band, swr]])),
    ),
    last: rows.at(-1)?.readings ?? [],
  }
}

const readingsOf = (rows: readonly FeedlineRow[], band: Band) =>
  rows.flatMap(({ readings }) => readings.filter((reading) => reading.band === band))

function lineFacts(details: Details): LineFacts {
  const cable = typeof details.cable === 'string' ? cableKeyOf(details.cable) : undefined
  return { ...(cable !== undefined && { cable }), ...numbersIn(details, ['lengthM']) }
}

function transformerFacts(details: Details, rows: readonly EfficiencyRow[]): TransformerFacts {
  const efficiency = rows.map(({ id, band, efficiency: value }) => [band, { efficiency: value, testId: id }])
  return {
    ...numbersIn(details, ['turnsPrimary', 'turnsSecondary', 'coreMassG', 'ratedWatts']),
    ...(rows.length > 0 && { efficiency: Object.fromEntries(efficiency) }),
  }
}

function sweepBaseline({ id, performed_on: performedOn, file, worst }: BaselineRow): SweepBaseline {
  return { testId: id, performedOn, file, worst }
}

const ACCURACY = [
  'accuracyPercentOfReading',
  'accuracyPercentOfFullScale',
  'accuracyAbsolute',
  'fullScale',
  'resolution',
  'reflectionError',
] as const

/** An instrument's accuracy from its details; null without an instrument. */
export function accuracyOf(instrument: { details: Details } | null): Accuracy | null {
  return instrument && numbersIn(instrument.details, ACCURACY)
}

function numberIn(details: Details, name: string): number | undefined {
  const value = details[name]
  return typeof value === 'number' ? value : undefined
}

function numbersIn<Name extends string>(
  details: Details,
  names: readonly Name[],
): Partial<Record<Name, number>> {
  const known = names.flatMap((name) => {
    const value = numberIn(details, name)
    return value === undefined ? [] : [[name, value] as const]
  })
  return Object.fromEntries(known) as Partial<Record<Name, number>>
}
