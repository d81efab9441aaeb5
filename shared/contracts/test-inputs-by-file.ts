import { z } from 'zod'
import { amount, id, text } from './fields.ts'
import { band } from './words.ts'

/**
 * Tests whose readings stand in an analyzer's file. The file is uploaded first (`upload-attachment`) and named here by
 * its id; `source` tells the two ways of entering apart, so that a fault names its field.
 */

/** The bands to be judged, each once. A band that the file does not reach is refused by its name. */
const judgedBands = z
  .array(band)
  .min(1)
  .max(14)
  .refine((bands) => new Set(bands).size === bands.length, 'Name each band once.')

const byFile = { source: z.literal('file'), file: id, bands: judgedBands }

/** A two-port file (.s2p) of two like devices joined at their high-impedance sides. */
export const pairLossByFile = z.strictObject({
  ...byFile,
  /** The other device of the pair. */
  partnerId: id.optional(),
})

/** A one-port file (.s1p) of the antenna. */
export const antennaSweepByFile = z.strictObject({
  ...byFile,
  /** Where the band is worked; absent: the whole band is judged. */
  workingPoints: z
    .array(z.strictObject({ band, frequencyMHz: amount(0.1, 3000) }))
    .max(60)
    .optional(),
  /** Later sweeps are compared with this one. */
  setsBaseline: z.boolean().default(false),
  conditions: text(400).default(''),
})

/** A two-port file of the line, or a one-port file with the far end open or shorted. */
export const feedlineLossByFile = z.strictObject({
  ...byFile,
  farEnd: z.enum(['open', 'short', 'second-port']),
  /** SWR at the radio's end with the antenna connected, which no file of the line alone holds. */
  swrAtRadio: z
    .array(z.strictObject({ band, swr: amount(1, 100) }))
    .max(14)
    .optional(),
  setsBaseline: z.boolean().default(false),
})

/** Three one-port files at the 50 ohm side, the secondary open, shorted and loaded with `loadOhm`. */
export const openShortLoadInputs = z
  .strictObject({
    open: id,
    short: id,
    load: id,
    /** Resistance of the load at the secondary, ohm: 2450 for 2:14 turns. */
    loadOhm: amount(1, 100_000),
    /** Stray capacitance that sits on the open alone, pF; 0 when the fixture stays on for all three. */
    openStrayPf: amount(0, 1000).default(0),
    bands: judgedBands,
  })
  .refine(({ open, short, load }) => new Set([open, short, load]).size === 3, {
    message: 'Open, short and load are three files.',
    path: ['load'],
  })
