import type { z } from 'zod'
import type { DueCheck, listDueChecks as contract } from '#shared/contracts/due-checks.ts'
import type { CheckState } from '#shared/engine/readiness/period-types.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { checksOfGroup } from './group-checks.ts'

type Query = z.output<typeof contract.query>

const PLACES: Statement = { name: 'due-places', text: 'SELECT id, name FROM place WHERE group_id = $1' }

interface Located extends DueCheck {
  readonly placeId: string | null
}

/** Everything in the group that is not current, whatever the filters: what reminders and digests read too. */
export async function dueChecksOf(tx: GroupTx, kitId: string | null = null): Promise<Located[]> {
  const [parts, places] = await Promise.all([
    checksOfGroup(tx, kitId),
    tx.sql<{ id: string; name: string }>(PLACES, [tx.groupId]),
  ])
  const placeOf = new Map(places.map((row) => [row.id, row.name]))
  return parts
    .flatMap(({ state, checks, kit, placeId }) => {
      const place = placeId === null ? null : (placeOf.get(placeId) ?? null)
      return dueOf(state, checks, { kit, place, placeId })
    })
    .sort(byDay)
}

interface Where {
  readonly kit: KitState['kit'] | null
  readonly place: string | null
  readonly placeId: string | null
}

function dueOf(state: KitState, checks: readonly CheckState[], { kit, place, placeId }: Where): Located[] {
  const itemOf = new Map(state.items.map((item) => [item.id, item]))
  return checks.flatMap((check): Located[] => {
    const item = itemOf.get(check.subjectId)
    if (check.state === 'current') return []
    return [
      {
        subject: {
          type: item ? 'item' : 'kit',
          id: check.subjectId,
          designation: item?.designation ?? state.kit.designation,
          category: item?.category ?? null,
        },
        procedure: check.procedure,
        band: check.band,
        vital: check.vital,
        state: check.state,
        dueOn: check.dueOn,
        testedOn: check.testedOn,
        testId: check.testId,
        because: check.because,
        raised: state.raisedChecks.some(
          (one) =>
            one.subjectId === check.subjectId &&
            one.procedure === check.procedure &&
            one.dueOn === check.dueOn,
        ),
        kit: kit && { id: kit.id, designation: kit.designation },
        place,
        placeId,
      },
    ]
  })
}

/** Overdue first, then by day; what was never tested has no day and comes with the overdue. */
function byDay(a: Located, b: Located): number {
  return rankOf(a) - rankOf(b) || compare(a.dueOn ?? '', b.dueOn ?? '') || compare(nameOf(a), nameOf(b))
}

const RANKS = { overdue: 0, never: 1, failed: 2, 'in-doubt': 3, 'due-soon': 4 } as const
const rankOf = ({ state }: DueCheck) => RANKS[state]
const nameOf = ({ subject, procedure }: DueCheck) => `${subject.designation} ${procedure}`
const compare = (a: string, b: string) => (a < b ? -1 : a > b ? 1 : 0)

/** One page of what is due. Filters narrow the rows, never the two counts. */
export async function listDueChecks(tx: GroupTx, query: Query): Promise<z.output<typeof contract.response>> {
  const all = await dueChecksOf(tx, query.kitId ?? null)
  const matching = all.filter((check) => matches(check, query))
  const ordered = query.descending ? matching.reverse() : matching
  const from = (query.page - 1) * query.size
  return {
    rows: ordered.slice(from, from + query.size),
    total: matching.length,
    overdue: all.filter(({ state }) => state === 'overdue').length,
    dueSoon: all.filter(({ state }) => state === 'due-soon').length,
  }
}

function matches(check: Located, { state, procedure, placeId, search }: Query): boolean {
  if (state && !state.includes(check.state)) return false
  if (procedure && !procedure.includes(check.procedure)) return false
  if (placeId !== undefined && check.placeId !== placeId) return false
  const text = `${check.subject.designation} ${check.kit?.designation ?? ''} ${check.place ?? ''} ${check.because}`
  return text.toLowerCase().includes(search.toLowerCase())
}
