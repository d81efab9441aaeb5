import type { getBuildSheet } from '#shared/contracts/build-sheets.ts'
import type { ResponseOf } from '#shared/contracts/endpoint.ts'
import { wiresToCut, type Construction, type WireToCut } from '#shared/engine/builds/winding-length.ts'
import { feedPointVoltage } from '#shared/engine/feed-point.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { impedanceRatio } from '#shared/engine/turns.ts'
import { awgDiameterMm } from '#shared/engine/wire-gauge.ts'
import { numberText, quantityText } from './quantity.ts'

type Sheet = ResponseOf<typeof getBuildSheet>
type LengthWriter = (metres: number) => string

interface CardRow {
  readonly label: string
  readonly text: string
}

export const CONSTRUCTION_WORDS: Readonly<Record<Construction, string>> = {
  tapped: 'One wire with a tap',
  bifilar: 'Primary twisted with the first turns',
  separate: 'Two windings apart',
}

const WIRE_WORDS: Readonly<Record<WireToCut['wire'], string>> = {
  whole: 'Wire to cut',
  primary: 'Primary wire to cut',
  secondary: 'Secondary wire to cut',
}

/** What the card says of a transformer, in the order of the work; a line that is not known is left out. */
export function windingRows(sheet: Sheet, length: LengthWriter): CardRow[] {
  const { details, winding } = sheet
  if (details.category !== 'transformer') return []
  const { core, cores, mix, wire, insulation, capacitorPf, capacitorV, connector } = details
  return [
    row('Core', [cores && cores > 1 ? `${cores} × ${core ?? 'core'}` : core, mix && `mix ${mix}`]),
    row('Turns', turnsOf(sheet)),
    row('Made as', [winding.construction && CONSTRUCTION_WORDS[winding.construction]]),
    row('Wire', [wire, gaugeOf(winding.awg)]),
    ...cutRows(sheet, length),
    row('Tap', [winding.tap]),
    row('Insulation', [insulation]),
    row('Capacitor', [
      capacitorPf !== undefined && quantityText(capacitorPf, 'pF', 1),
      capacitorV !== undefined && `rated ${quantityText(capacitorV, 'V', 0)}`,
    ]),
    row('Connector', [connector]),
    ...commonRows(sheet),
  ].filter(({ text }) => text !== '')
}

/** The same of an antenna. */
export function antennaRows(sheet: Sheet, length: LengthWriter): CardRow[] {
  const { details, winding } = sheet
  if (details.category !== 'antenna') return []
  const { design, lengthM, wire, feedOhms, connector } = details
  return [
    row('Design', [design]),
    row('Wire', [wire, gaugeOf(winding.awg)]),
    row('Length', [lengthM !== undefined && `${length(lengthM)}: cut longer, trim to resonance`]),
    row('Feed point', [feedOhms !== undefined && quantityText(feedOhms, 'Ω', 0)]),
    row('Connector', [connector]),
    ...commonRows(sheet),
  ].filter(({ text }) => text !== '')
}

const row = (label: string, parts: readonly (string | false | undefined)[]): CardRow => ({
  label,
  text: parts.filter(Boolean).join(', '),
})

function commonRows({ details, winding }: Sheet): CardRow[] {
  const watts = details.ratedWatts
  const { materialsCost, currency } = winding
  return [
    row('For', [details.bands?.join(', '), watts !== undefined && quantityText(watts, 'W', 0)]),
    row('Materials cost', [
      materialsCost !== undefined && `${numberText(materialsCost, 2, true)} ${currency ?? ''}`.trim(),
    ]),
  ]
}

function turnsOf({ details }: Sheet): string[] {
  if (details.category !== 'transformer') return []
  const { turnsPrimary, turnsSecondary } = details
  if (turnsPrimary === undefined || turnsSecondary === undefined) return []
  const ratio = impedanceRatio(turnsPrimary, turnsSecondary)
  const turns = `${numberText(turnsPrimary, 1)} : ${numberText(turnsSecondary, 1)}`
  return isFailure(ratio)
    ? [turns]
    : [
        turns,
        `${numberText(ratio.impedanceRatio, 1)} : 1, ${quantityText(ratio.secondaryOhm, 'Ω', 0)} for 50 Ω`,
      ]
}

function gaugeOf(awg: number | undefined): string | undefined {
  if (awg === undefined) return undefined
  const diameter = awgDiameterMm(awg)
  const name = awg > 0 ? String(awg) : `${1 - awg}/0`
  return isFailure(diameter) ? `AWG ${name}` : `AWG ${name} (${quantityText(diameter, 'mm', 2)} bare)`
}

/** What is missing for the computed length stands in its place. */
function cutRows({ details, winding }: Sheet, length: LengthWriter): CardRow[] {
  if (details.category !== 'transformer') return []
  const { construction, meanTurnMm, tailMm = 0 } = winding
  const { turnsPrimary, turnsSecondary } = details
  if (turnsPrimary === undefined || turnsSecondary === undefined) return []
  if (meanTurnMm === undefined || construction === undefined) {
    const text = 'not known: enter how it is wound and the mean length of a turn in the build sheet'
    return [{ label: 'Wire to cut', text }]
  }
  const wires = wiresToCut({
    construction,
    primaryTurns: turnsPrimary,
    secondaryTurns: turnsSecondary,
    meanTurnMm,
    tailMm,
  })
  if (isFailure(wires)) return []
  return wires.map((wire) => ({
    label: WIRE_WORDS[wire.wire],
    text: `${length(wire.lengthMm / 1000)}: ${numberText(wire.turns, 1)} turns × ${quantityText(meanTurnMm, 'mm', 1)} + ${wire.tails} tails × ${quantityText(tailMm, 'mm', 0)}`,
  }))
}

/** The voltage at the high side, where the turns and the power are known: what the insulation has to stand. */
function highVoltage({ details }: Sheet): string {
  const ohms = details.category === 'antenna' ? details.feedOhms : secondaryOhms(details)
  if (ohms === undefined || details.ratedWatts === undefined) return 'Hundreds of volts'
  const voltage = feedPointVoltage({ powerW: details.ratedWatts, resistanceOhm: ohms })
  if (isFailure(voltage)) return 'Hundreds of volts'
  return `About ${quantityText(voltage.peakV, 'V', 0)} peak`
}

function secondaryOhms(details: Sheet['details']): number | undefined {
  if (details.category !== 'transformer') return undefined
  const ratio = impedanceRatio(details.turnsPrimary ?? 0, details.turnsSecondary ?? 0)
  return isFailure(ratio) ? undefined : ratio.secondaryOhm
}

/** Every card carries these; the sheet's own come first. Common practice, no source. */
export function cardCautions(sheet: Sheet): string[] {
  const watts = sheet.details.ratedWatts
  const at = watts === undefined ? 'under power' : `at ${quantityText(watts, 'W', 0)}`
  return [
    ...(sheet.winding.cautions?.split('\n').filter(Boolean) ?? []),
    `${highVoltage(sheet)} at the high side ${at}, more when it is not matched: it burns. Touch nothing while the key is down.`,
    'Cores, resistors and wire get hot enough to burn, and stay so after the key is up. A ferrite that cracks throws chips: wear glasses.',
    'Test into the fixture or a dummy load, under a licensed control operator. Watch the temperature: let the key up at the limit.',
    'A capacitor’s voltage rating is for direct current; at radio frequency keep at least twice the peak in hand.',
    'Local codes, the equipment’s manuals and licensed practice come first. This card is a reminder.',
  ]
}
