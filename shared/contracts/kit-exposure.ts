import { z } from 'zod'
import { EMISSION_DUTIES, type EmissionId } from '#shared/engine/emission-duty.ts'
import { defineEndpoint } from './endpoint.ts'
import { id, newId } from './fields.ts'
import { CREW } from './roles.ts'
import { answeredAt, band } from './words.ts'

const EMISSIONS = Object.keys(EMISSION_DUTIES) as [EmissionId, ...EmissionId[]]
const minutes = z.coerce.number().min(0).max(1440)

/** How the station is used, with what a group would try first. */
export const exposureUse = z.strictObject({
  emission: z.enum(EMISSIONS).default('ssb-conversational'),
  onMinutes: minutes.default(5),
  offMinutes: minutes.default(5),
  /** Of the antenna, dBi; 2.15 is a dipole. */
  gainDbi: z.coerce.number().min(-20).max(30).default(2.15),
})

const tier = z.object({ averageW: z.number(), distanceM: z.number(), covered: z.boolean() })
const warning = z.object({ code: z.string(), message: z.string() })

/** The configuration and what follows from it; shown with its caution. */
const evaluation = z.object({
  use: z.object({
    emission: z.string(),
    onMinutes: z.number(),
    offMinutes: z.number(),
    gainDbi: z.number(),
  }),
  /** The antenna of the kit that the figures are about, with what its page says; null without one. */
  antenna: z
    .object({
      id: z.string(),
      designation: z.string(),
      lengthM: z.number().nullable(),
      feedOhm: z.number().nullable(),
    })
    .nullable(),
  bands: z.array(
    z.object({
      band,
      frequencyMHz: z.number(),
      pepAtAntennaW: z.number(),
      controlled: tier,
      general: tier,
      feedPoint: z.object({ rmsV: z.number(), peakV: z.number() }).nullable(),
      warnings: z.array(warning),
    }),
  ),
  /** Bands whose power at the antenna nobody knows. */
  unknownBands: z.array(band),
  source: z.string(),
})

export const kitExposureRecord = evaluation.extend({
  kitId: z.string(),
  designation: z.string(),
  asOf: answeredAt,
  caution: z.string(),
})

/** An evaluation as somebody put it on record, and what has changed of the kit since. */
export const exposureRecord = evaluation.extend({
  id: z.string(),
  recordedOn: z.string(),
  recordedAt: answeredAt,
  recordedBy: z.string(),
  /** A sentence for each change of antenna, bands or power; empty: it is about the kit as it stands. */
  changed: z.array(z.string()),
})

/** What the page of a kit says of its newest record. */
export const exposureNote = exposureRecord.pick({ recordedOn: true, recordedBy: true, changed: true })

export const readKitExposure = defineEndpoint({
  name: 'read-kit-exposure',
  method: 'get',
  path: '/api/v1/kits/:kitId/exposure',
  summary: 'Distances to keep from the antenna of a kit as it stands, and the voltage at its feed point',
  access: { scope: 'group', roles: CREW },
  params: z.strictObject({ kitId: id }),
  query: exposureUse,
  response: kitExposureRecord,
})

/** The client makes the id: sending twice records once. */
export const recordExposure = defineEndpoint({
  name: 'record-exposure',
  method: 'post',
  path: '/api/v1/kits/:kitId/exposure-records',
  summary: 'Put the exposure evaluation of a kit as it stands on record',
  access: { scope: 'group', roles: CREW },
  params: z.strictObject({ kitId: id }),
  body: z.strictObject({
    recordId: newId,
    emission: z.enum(EMISSIONS),
    onMinutes: z.number().min(0).max(1440),
    offMinutes: z.number().min(0).max(1440),
    gainDbi: z.number().min(-20).max(30),
  }),
  response: exposureRecord,
  problems: ['id-taken'],
})

export const listExposureRecords = defineEndpoint({
  name: 'list-exposure-records',
  method: 'get',
  path: '/api/v1/kits/:kitId/exposure-records',
  summary: 'The newest exposure records of a kit, and what has changed of it since each',
  access: { scope: 'group', roles: CREW },
  params: z.strictObject({ kitId: id }),
  response: z.object({ records: z.array(exposureRecord) }),
})

export type ExposureEvaluation = z.output<typeof evaluation>
export type ExposureNote = z.output<typeof exposureNote>
export type ExposureRecord = z.output<typeof exposureRecord>
export type KitExposureRecord = z.output<typeof kitExposureRecord>
