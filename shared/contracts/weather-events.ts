import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id, line, newId, plainDate } from './fields.ts'
import { LEADS } from './roles.ts'
import { answeredAt, procedure, verdict } from './words.ts'

const standing = z.object({ verdict, holdsUntil: answeredAt.nullable() })

const fields = {
  /** What happened: stands as the reason of every check. */
  reason: line(200, 1),
  dueOn: plainDate,
  /** Where it was. */
  placeIds: z.array(id).max(100),
  /** Kits that are out on issue were in it too. */
  onIssue: z.boolean(),
  /** What was found before is in doubt until looked at: the kits say so at once. */
  doubtsEarlier: z.boolean(),
}

const isSomewhere = ({ placeIds, onIssue }: { placeIds: readonly string[]; onIssue: boolean }) =>
  placeIds.length > 0 || onIssue
const somewhere = { path: ['placeIds'], message: 'Choose where it was.' }

const weatherEffect = z.object({
  checks: z.array(
    z.object({ itemId: z.string(), designation: z.string(), kit: z.string().nullable(), procedure }),
  ),
  /** Kits of which the verdict, or the time that it holds, changes. */
  kits: z.array(z.object({ kitId: z.string(), designation: z.string(), before: standing, after: standing })),
})

/** What a weather event would make due. Stores nothing. */
export const previewWeather = defineEndpoint({
  name: 'preview-weather',
  method: 'post',
  path: '/api/v1/weather-events/preview',
  summary: 'Which exposed items a weather event would make due, and what that does to their kits',
  access: { scope: 'group', roles: LEADS },
  body: z.strictObject(fields).refine(isSomewhere, somewhere),
  response: weatherEffect,
  problems: ['request-invalid'],
})

export const raiseWeather = defineEndpoint({
  name: 'raise-weather',
  method: 'post',
  path: '/api/v1/weather-events',
  summary: 'After weather: every exposed item there is due, with the reason; sent again it is raised once',
  access: { scope: 'group', roles: LEADS },
  body: z
    .strictObject({
      /** Made by the client: an event that is sent again is raised once. */
      eventId: newId,
      ...fields,
    })
    .refine(isSomewhere, somewhere),
  response: weatherEffect,
  problems: ['request-invalid', 'id-taken'],
})

export type WeatherEffect = z.output<typeof weatherEffect>
