import { z } from 'zod'
import { amount, id, line, text } from './fields.ts'
import { band } from './words.ts'

/** What is noted in checks that are looked at rather than measured: inspection, count, calibration and the like. */

export const inspectionInputs = z
  .strictObject({
    serviceable: z.boolean(),
    /** What was found: "one cell dead", "rattles", "nothing". */
    found: text(300),
  })
  .refine(({ serviceable, found }) => serviceable || found !== '', {
    message: 'Say what is wrong.',
    path: ['found'],
  })

export const countInputs = z.strictObject({
  /** Every position of the load plan that was looked at. */
  positions: z
    .array(
      z.strictObject({
        positionId: id,
        /** How many are there, whatever the record says. */
        found: z.int().min(0).max(50),
        /** Items of the record that were not seen. */
        missingItemIds: z.array(id).max(50).default([]),
      }),
    )
    .min(1)
    .max(200),
  /** Items seen in the kit that the record has elsewhere. */
  extraItemIds: z.array(id).max(50).default([]),
  extraText: text(300).default(''),
  /** Number of the seal that was on the lid; null: none or broken. */
  sealFound: line(40).nullable(),
  /** Number of the new seal; null: left open. */
  sealApplied: line(40).nullable(),
})

export const calibrationInputs = z.strictObject({
  passed: z.boolean(),
  certificate: line(80).default(''),
  laboratory: line(120).default(''),
  /** Largest deviation found, in words: "2 % at 50 W". */
  deviation: line(200).default(''),
})

export const sessionCheckInputs = z.strictObject({
  /** The reference part that was read. */
  partId: id,
  /** In the unit of the part's agreed value. */
  reading: amount(-1_000_000, 1_000_000),
})

export const bootAndUpdateInputs = z.strictObject({
  boots: z.boolean(),
  updatesDone: z.boolean(),
  clockRight: z.boolean().optional(),
  softwareVersion: line(80).default(''),
})

/** One contact on each band: shows that the whole chain works, and says nothing about its losses. */
export const onAirCheckInputs = z.strictObject({
  contacts: z
    .array(
      z.strictObject({
        band,
        /** Power setting of the radio, W. */
        powerW: amount(0.1, 2000),
        answered: z.boolean(),
        /** Who answered, in words: "the net's relief station". */
        answeredBy: line(80).default(''),
        /** Reports as exchanged. */
        reportReceived: line(40).default(''),
        reportSent: line(40).default(''),
      }),
    )
    .min(1)
    .max(14)
    .refine((contacts) => new Set(contacts.map((contact) => contact.band)).size === contacts.length, {
      message: 'Name each band once.',
    }),
  conditions: text(400).default(''),
})
