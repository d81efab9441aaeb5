/**
 * How each procedure is usually done here, with the cautions that come before it. They defer to local codes, to the
 * equipment's own manual and to licensed practice, and approve nothing.
 */
import { NO_SOURCE } from '../policy/default-policy.ts'
import type { Procedure } from '../vocabulary.ts'

export interface MethodCard {
  readonly name: string
  readonly steps: readonly string[]
  readonly cautions: readonly string[]
  readonly source: string
}

/** Minutes since key-down at which a heat test is read, and minutes after key-up. */
export const HEAT_READING_MINUTES = [0, 1, 2, 3, 5, 8, 10] as const
export const HEAT_COOLING_MINUTES = [5] as const

/** The reading times of a test of another length: those that fall inside it, and its end. */
export function heatReadingMinutes(minutes: number): number[] {
  return [...HEAT_READING_MINUTES.filter((minute) => minute < minutes), minutes]
}

const DEFERS = 'Local codes, the manual of the equipment and the licensed operator come first.'
const BURNS =
  'The feed point and the far wire ends carry hundreds of volts while transmitting: nobody within reach, say "clear?" first.'
const CONTROL = 'Transmit only under a licensed control operator, into a dummy load or on a clear frequency.'
const HOT = 'The core and the load get hot enough to burn. Do not touch them until the cooling time is over.'
const MAST = 'Keep masts and wires at least one and a half times their height away from power lines.'
const LITHIUM =
  'Swollen, hot or odd-smelling lithium packs stay untouched outdoors. Charge at 0 to 40 °C, attended.'
const LEAD = 'Lead-acid gives off hydrogen and acid: ventilate, protect eyes, no sparks, cover the terminals.'
const SHORT = 'Take rings off and fuse close to the battery: a short circuit burns.'

const NO_TRANSMITTER =
  'Nothing may transmit into an analyzer: radio off, and no transmitter close by while it is connected.'

const card = (name: string, steps: readonly string[], cautions: readonly string[]): MethodCard => ({
  name,
  steps,
  cautions: [...cautions, DEFERS],
  source: NO_SOURCE,
})

const heatSteps = (load: string) => [
  `Connect ${load}. Set the carrier power, never above the rating of the part.`,
  'Fix the probe to the core and note where; close the enclosure as it is used.',
  'Note the ambient temperature and the SWR at key-down, then read at each prompt and watch the SWR throughout.',
  'Release the key at the end or at the stop temperature, and read once more after five minutes of cooling.',
]

export const METHOD_CARDS: Readonly<Record<Procedure, readonly MethodCard[]>> = {
  'heat-test': [
    card('Key-down, 2450 ohm fixture', heatSteps('the 2450 ohm fixture'), [BURNS, CONTROL, HOT]),
    card('Key-down, antenna connected', heatSteps('the antenna it is used with'), [
      BURNS,
      CONTROL,
      HOT,
      MAST,
    ]),
  ],
  'pair-loss': [
    card(
      'Two units back to back, wattmeter',
      [
        'Join two like units at their high-impedance sides, with short leads.',
        'Read the net forward power before the first and after the second, into a dummy load, band by band.',
      ],
      [BURNS, CONTROL, HOT],
    ),
    card(
      'Two units back to back, analyzer',
      [
        'Join two like units at their high-impedance sides, with short leads.',
        'Calibrate the analyzer at both ends of its leads, then sweep from port 1 to port 2 and save a .s2p file.',
      ],
      [NO_TRANSMITTER],
    ),
  ],
  'open-short-load': [
    card(
      'Open, short and load at the secondary',
      [
        'Calibrate the analyzer at the end of its lead, over all the bands.',
        'Sweep with the load resistor at the secondary and save a .s1p file.',
        'Lift only the resistor and sweep the open; then short it and sweep. Same leads, same fixture, same points.',
      ],
      [NO_TRANSMITTER],
    ),
  ],
  'antenna-sweep': [
    card(
      'Sweep at the working points',
      [
        'Raise the antenna as it is used, clear of metal.',
        'Calibrate the analyzer at the end of its lead.',
        'Read the SWR at the working points of each band, and the frequency of the lowest.',
      ],
      [MAST],
    ),
  ],
  'feedline-loss': [
    card(
      'Far end open or shorted, half the return loss',
      ['Open or short the far end.', 'Read the return loss on each band and take half of it.'],
      [],
    ),
    card(
      'Both ends on the analyzer',
      ['Calibrate the analyzer at both ends of its leads.', 'Sweep through the line and save a .s2p file.'],
      [NO_TRANSMITTER],
    ),
    card(
      'Two power readings into a dummy load',
      ['Read the power at both ends of the line, into a dummy load at the far end.'],
      [CONTROL],
    ),
  ],
  'battery-capacity': [
    card(
      'Discharge to the cut-off',
      [
        'Charge fully and let it rest.',
        'Discharge at the current of its use down to the cut-off voltage; note current, cut-off and temperature.',
        'Enter the ampere-hours taken out. A resting voltage is no measure of capacity.',
      ],
      [LITHIUM, LEAD, SHORT],
    ),
  ],
  'radio-check': [
    card(
      'Power into a dummy load, receive check',
      ['Read the power at each setting, band by band, and the supply current.', 'Listen to a known signal.'],
      [CONTROL, HOT],
    ),
  ],
  inspection: [
    card(
      'Looked at, shaken, connectors opened',
      [
        'Look for cracks, burns, corrosion and loose parts.',
        'Take connectors apart: the outside tells nothing.',
      ],
      ['A cracked ferrite core has sharp edges: gloves and glasses.'],
    ),
  ],
  count: [
    card(
      'Counted against the load plan',
      [
        'Read the number of the seal before it is broken.',
        'Take out every position and say what is there.',
        'Close with a new seal and enter its number.',
      ],
      ['Batteries make a kit heavy: lift with two where its weight asks for it.'],
    ),
  ],
  calibration: [
    card('By a laboratory', ['Enter the number of the certificate and the largest deviation found.'], []),
    card(
      'Compared with a reference',
      ['Compare with an instrument that is in date, at the readings used most.'],
      [],
    ),
  ],
  'session-check': [
    card(
      'A reference part, at the start of the session',
      [
        'Let the instrument warm up and calibrate it as usual, at the end of its lead.',
        'Read the part as its record says: same leads, same place, same setting.',
        'Enter the reading before anything else is measured, and again at the end of a long session.',
      ],
      [],
    ),
  ],
  'boot-and-update': [
    card(
      'Booted, updated, clock checked',
      [
        'Boot from its own battery.',
        'Install all updates and restart.',
        'Check the clock and the software of the kit.',
      ],
      [],
    ),
  ],
  'on-air-check': [
    card('Contact on the air', ['Make one contact on each band and note both reports.'], [BURNS, CONTROL]),
  ],
}
