import {
  changeReminderLink,
  listUndelivered,
  readReminderLink,
  stopReminders,
} from '#shared/contracts/reminder-links.ts'
import type { AppContext } from '../context.ts'
import { inGroup } from '../group-transaction.ts'
import { changeReminderChoice, readReminderChoice } from '../services/reminders/reminder-links.ts'
import { undeliveredOf } from '../services/undelivered.ts'
import type { EndpointRouter } from './endpoint.ts'

export function reminderRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(readReminderLink, ({ params, actor }) => readReminderChoice(ctx, actor, params.token))
  endpoints.add(changeReminderLink, ({ params, body, actor }) =>
    changeReminderChoice(ctx, actor, { token: params.token, wantsReminders: body.wantsReminders }),
  )
  endpoints.add(stopReminders, async ({ params, actor }) => {
    await changeReminderChoice(ctx, actor, { token: params.token, wantsReminders: false })
    return undefined
  })
  endpoints.add(listUndelivered, ({ by }) => inGroup(ctx, by, undeliveredOf))
}
