import type { Band } from '../vocabulary.ts'
import { replaceAction } from './actions.ts'
import { CLEAR, joinParts, standingPart, type BandPart } from './band-part.ts'
import type { Moment } from './moment.ts'
import { reasonAbout } from './reason.ts'
import { ruleFor } from './rules-in-force.ts'
import { lineLossText } from './sentences.ts'
import type { Standing } from './standing.ts'
import type { ReadinessItem } from './types.ts'
import { standingOnBand } from './whole-or-band.ts'

/**
 * Loss between radio and antenna other than the transformer's. What was entered for the kit holds the antenna's SWR
 * already, so nothing is added for mismatch; a failed loss test counts with its measured figure. Null: nobody knows.
 */
export function linePart(moment: Moment, lines: readonly ReadinessItem[], band: Band): BandPart {
  return joinParts(lines.map((line) => oneLine(moment, line, band)))
}

function oneLine(moment: Moment, line: ReadinessItem, band: Band): BandPart {
  const entered = line.facts.lossDb?.[band] ?? null
  const rule = ruleFor(moment.policy, line, 'feedline-loss', moment.today, band)
  const check = { item: line, procedure: 'feedline-loss', rule, band, failsEverywhere: true } as const
  const standing = standingOnBand(moment, check)
  const measured = standing.finding?.measure === 'lossDb' ? standing.finding.value : null
  if (standing.state === 'failed') return failedLine(line, band, standing, worse(entered, measured))
  const part = standingPart({ item: line, rule, procedure: 'feedline-loss', band: null }, standing)
  // Only a feedline must say its loss; a jumper or filter without a figure is taken as lossless, as its kit's figure
  // from radio to antenna includes it.
  const known = entered ?? measured ?? (line.category === 'feedline' ? null : 0)
  return { ...part, lossDb: known }
}

function failedLine(
  line: ReadinessItem,
  band: Band,
  { test, finding }: Standing,
  lossDb: number | null,
): BandPart {
  const reason = reasonAbout(line, {
    code: 'feedline-failed',
    level: 'limit',
    text: lineLossText(line.designation, band, finding!),
    band,
    testId: test!.id,
    procedure: 'feedline-loss',
    action: replaceAction(line.designation),
  })
  return { ...CLEAR, state: 'limited', lossDb, tests: [test!], reasons: [reason] }
}

function worse(a: number | null, b: number | null): number | null {
  if (a === null || b === null) return a ?? b
  return Math.max(a, b)
}
