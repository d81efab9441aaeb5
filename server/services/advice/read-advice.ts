import type { ResponseOf } from '#shared/contracts/endpoint.ts'
import type { readAdvice as contract } from '#shared/contracts/advice.ts'
import type { Plan } from '#shared/engine/advice/work.ts'
import type { AppContext } from '../../context.ts'
import type { By } from '../registry/thing.ts'
import { advicePlans } from './advice-plans.ts'

type Answer = ResponseOf<typeof contract>

export async function readAdvice(ctx: AppContext, by: By): Promise<Answer> {
  const { plans, at, wanting, leftOut } = await advicePlans(ctx, by)
  return { at: at.toISOString(), plans: plans.map(shown), wanting, leftOut }
}

function shown({
  works,
  minutes,
  changes,
  countAfter,
  deployable,
  proven,
  returned,
}: Plan): Answer['plans'][number] {
  return {
    minutes,
    works: works.map(({ text, minutes: each, steps }) => ({ text, minutes: each, steps: [...steps] })),
    changes: [...changes],
    countAfter: [...countAfter],
    deployable,
    proven,
    returned,
  }
}
