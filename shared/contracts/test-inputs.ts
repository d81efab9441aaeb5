import { z } from 'zod'
import { amount, id, line, text } from './fields.ts'
import { antennaSweepByFile, feedlineLossByFile, pairLossByFile } from './test-inputs-by-file.ts'
import { band } from './words.ts'

/** What is read off the instruments, by procedure. The engine turns it into results (`shared/engine/procedures`). */

/** One band and one power a test. Times in seconds since key-down; the engine does the rest. */
export const heatTestInputs = z.strictObject({
  band,
  powerW: amount(0.1, 2000),
  load: z.enum(['fixture-2450', 'antenna', 'other']),
  enclosure: z.enum(['open', 'closed']),
  ambientC: amount(-40, 85),
  readings: z
    .array(z.strictObject({ atS: amount(0, 86_400), temperatureC: amount(-40, 300) }))
    .min(2)
    .max(500),
  /** When the key was released; later readings are cooling. */
  keyUpAtS: amount(1, 86_400),
  /** The key was released because the stop temperature was reached. */
  stoppedAtLimit: z.boolean(),
  /** SWR at key-down, and the lowest and highest seen while keyed; absent: not watched. */
  swr: z
    .strictObject({ start: amount(1, 100), lowest: amount(1, 100), highest: amount(1, 100) })
    .refine(
      ({ start, lowest, highest }) => lowest <= start && start <= highest,
      'Lowest <= start <= highest.',
    )
    .optional(),
  /** Probe type and place, shade or sun, emissivity. */
  conditions: text(400).default(''),
})

/** Two like devices back to back, net forward power before and after them. */
const pairLossByHand = z.strictObject({
  source: z.literal('readings').optional(),
  /** The other device of the pair. */
  partnerId: id.optional(),
  /** One meter moved from place to place shares its scale error between both readings; two meters do not. */
  meters: z.enum(['one-moved', 'two']),
  bands: z
    .array(
      z.strictObject({
        band,
        frequencyMHz: amount(0.1, 3000).optional(),
        inW: amount(0.01, 2000),
        outW: amount(0.01, 2000),
      }),
    )
    .min(1)
    .max(14),
})

export const pairLossInputs = z.discriminatedUnion('source', [pairLossByHand, pairLossByFile])

const antennaSweepByHand = z.strictObject({
  source: z.literal('readings').optional(),
  /** SWR read at the working points; several a band are allowed, the worst counts. */
  points: z
    .array(z.strictObject({ band, frequencyMHz: amount(0.1, 3000), swr: amount(1, 100) }))
    .min(1)
    .max(60),
  /** Frequency of lowest SWR by band. */
  resonances: z
    .array(z.strictObject({ band, frequencyMHz: amount(0.1, 3000), swr: amount(1, 100).optional() }))
    .max(14)
    .default([]),
  /** Later sweeps are compared with this one. */
  setsBaseline: z.boolean().optional(),
  conditions: text(400).default(''),
})

export const antennaSweepInputs = z.discriminatedUnion('source', [antennaSweepByHand, antennaSweepByFile])

const feedlineLossByHand = z.strictObject({
  source: z.literal('readings').optional(),
  readings: z
    .array(
      z.strictObject({
        band,
        frequencyMHz: amount(0.1, 3000).optional(),
        lossDb: amount(0, 60),
        /** SWR at the radio's end: it improves as loss grows, which is why it is kept beside the loss. */
        swrAtRadio: amount(1, 100).optional(),
      }),
    )
    .min(1)
    .max(14),
  /** This is a new line's baseline: later tests are compared with it. */
  setsBaseline: z.boolean().default(false),
})

export const feedlineLossInputs = z.discriminatedUnion('source', [feedlineLossByHand, feedlineLossByFile])

export const VOLTAGE_IS_NOT_CAPACITY =
  'A voltage says nothing about capacity: a worn battery rests at the same voltage as a new one. ' +
  'Enter the ampere-hours taken out, or the current and how long it ran.'

export const batteryCapacityInputs = z
  .strictObject({
    /** Ampere-hours taken out down to the cut-off, as a tester shows them. */
    measuredAh: amount(0.01, 2000).optional(),
    /** Discharge current, A: a result holds for its current. */
    currentA: amount(0.01, 1000).optional(),
    /** How long that current ran, h. */
    hours: amount(0.01, 1000).optional(),
    cutOffV: amount(0.5, 400),
    temperatureC: amount(-40, 80),
    /** Kept for the record; never evidence of capacity. */
    restingV: amount(0, 400).optional(),
  })
  .refine(({ measuredAh, currentA, hours }) => measuredAh !== undefined || (currentA && hours), {
    message: VOLTAGE_IS_NOT_CAPACITY,
    path: ['measuredAh'],
  })

export const radioCheckInputs = z.strictObject({
  readings: z
    .array(
      z.strictObject({
        band,
        /** Power setting of the radio, W. */
        settingW: amount(0.1, 2000),
        measuredW: amount(0, 2000),
        /** Supply current while transmitting, A. */
        currentA: amount(0, 200).optional(),
      }),
    )
    .min(1)
    .max(60),
  supplyV: amount(1, 60).optional(),
  /** Supply current while receiving, A. */
  receiveA: amount(0, 200).optional(),
  /** Where the currents were read: in the radio's own lead, or in the battery's with the whole station running. */
  currentOf: z.enum(['radio', 'station']).optional(),
  receives: z.boolean(),
  memoryVersion: line(40).optional(),
})
