import type { Band } from '../vocabulary.ts'
import { CLEAR, joinParts, type BandPart } from './band-part.ts'
import type { Moment } from './moment.ts'
import { reasonOf } from './reason.ts'
import { ruleFor } from './rules-in-force.ts'
import { amountText, replaceAction } from './sentences.ts'
import { standingOf, type Standing } from './standing.ts'
import type { ReadinessItem } from './types.ts'

const LOSS = ['feedline-loss'] as const

/**
 * Loss between radio and antenna other than the transformer's. What was entered for the kit holds the antenna's SWR
 * already, so nothing is added for mismatch; a failed loss test counts with its measured figure. Null: nobody knows.
 */
export function linePart(moment: Moment, lines: readonly ReadinessItem[], band: Band): BandPart {
  return joinParts(lines.map((line) => oneLine(moment, line, band)))
}

function oneLine(moment: Moment, line: ReadinessItem, band: Band): BandPart {
  const entered = line.facts.lossDb?.[band] ?? null
  // Only a feedline must say its loss; a jumper or filter without a figure is taken as lossless, as its kit's figure
  // from radio to antenna includes it.
  if (line.category !== 'feedline') return { ...CLEAR, lossDb: entered ?? 0 }
  const rule = ruleFor(moment.policy, line, 'feedline-loss', moment.today)
  const standing = standingOf(moment, { subjectId: line.id, procedures: LOSS, rule, band: null })
  const measured = standing.finding?.measure === 'lossDb' ? standing.finding.value : null
  if (standing.state !== 'failed') return { ...CLEAR, lossDb: entered ?? measured }
  return failedLine(line, standing, worse(entered, measured))
}

function failedLine(line: ReadinessItem, standing: Standing, lossDb: number | null): BandPart {
  const loss = standing.finding?.value ?? null
  const figure = loss === null ? standing.finding!.text : `loses ${amountText(loss)} dB`
  const reason = reasonOf({
    code: 'feedline-failed',
    level: 'limit',
    text: `${line.designation} ${figure}: less power reaches the antenna`,
    itemId: line.id,
    positionId: line.positionId,
    testId: standing.test!.id,
    procedure: 'feedline-loss',
    action: replaceAction(line.designation),
  })
  return { ...CLEAR, state: 'limited', lossDb, reasons: [reason] }
}

function worse(a: number | null, b: number | null): number | null {
  if (a === null || b === null) return a ?? b
  return Math.max(a, b)
}
