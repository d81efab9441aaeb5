import { systemActor, type Actor } from '#server/caller.ts'
import type { AppContext } from '#server/context.ts'
import { inGroup } from '#server/group-transaction.ts'
import { foundGroup, openGroup } from '#server/services/found-group.ts'
import { refreshBoard } from '#server/services/refresh-board.ts'
import { Calendar, D0_ON, onDay, ZONE } from './calendar.ts'
import { RECORD_BEGINS_ON } from './dates.ts'
import type { Step } from './deeds.ts'
import { Ids } from './ids.ts'
import { hashPasswords } from './passwords.ts'
import { PEOPLE } from './people.ts'
import { memberIdAt } from './play/people.ts'
import { play } from './play/play.ts'
import type { Stage, Theatre } from './play/stage.ts'
import { TIMELINE } from './timeline.ts'

const GROUP = {
  name: 'Alder Reach Auxiliary Radio Group',
  shortName: 'ARARG',
  timeZone: ZONE,
  returnAddress: 'Alder Reach Auxiliary Radio Group, Station 4, Pell Harbor',
  demo: true,
} as const

/**
 * Loads the demo group into a database without any group: fourteen months through the services, in the order of time,
 * each step seen by them at its own moment and from its own member. Every date is moved by the same whole number of
 * days, so that the scenario's D0 falls on the day of `asOf`. The same `asOf` gives the same rows, but for the salts of
 * the passwords and the ids that services make for themselves. The group is opened last: if a step fails, nobody ever
 * sees it.
 */
export async function seedDemo(ctx: AppContext, { asOf }: { asOf: Date }): Promise<{ groupId: string }> {
  const calendar = new Calendar(asOf)
  const ids = new Ids()
  const foundedAt = calendar.at(onDay(RECORD_BEGINS_ON, '18:30'))
  const groupId = ids.make('group', foundedAt)
  const passwordHashes = await hashPasswords()
  const theatre: Theatre = { groupId, calendar, ids, where: new Map(), passwordHashes }
  await inGroup(at(ctx, foundedAt), { groupId, actor: systemActor('demo') }, (tx) => foundGroup(tx, GROUP))
  for (const [index, step] of TIMELINE.entries()) await playStep(ctx, theatre, step, index + 1)
  await open(ctx, theatre)
  return { groupId }
}

const at = (ctx: AppContext, now: Date): AppContext => ({ ...ctx, clock: { now: () => now } })

async function playStep(ctx: AppContext, theatre: Theatre, step: Step, number: number): Promise<void> {
  const now = theatre.calendar.at(step.at)
  const memberId = memberIdAt(theatre, step.by, now)
  const actor: Actor = { memberId, name: PEOPLE[step.by].name, address: 'demo', requestId: `demo-${number}` }
  const stage: Stage = {
    ...theatre,
    ctx: at(ctx, now),
    by: { groupId: theatre.groupId, memberId, actor },
    now,
  }
  try {
    await play(stage, step.deed)
  } catch (error) {
    throw new Error(`Step ${number} of the demo, ${step.at} by ${step.by}: ${JSON.stringify(step.deed)}`, {
      cause: error,
    })
  }
}

const WAIT_FOR_DISK = { name: 'wait-for-disk', text: 'SET LOCAL synchronous_commit = on' }

/** What has run out since the last step shows on the kept board from the first look on. */
async function open(ctx: AppContext, { groupId, calendar }: Theatre): Promise<void> {
  const morning = calendar.at(onDay(D0_ON, '00:00'))
  await inGroup(at(ctx, morning), { groupId, actor: systemActor('demo') }, async (tx) => {
    await refreshBoard(tx)
    await openGroup(tx)
    await tx.sql(WAIT_FOR_DISK)
  })
}
