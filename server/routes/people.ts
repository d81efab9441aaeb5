import {
  changeRoles,
  getPerson,
  inviteAgain,
  invitePerson,
  listMembers,
  listPeople,
  removePerson,
  updatePerson,
} from '#shared/contracts/people.ts'
import type { AppContext } from '../context.ts'
import { inGroup } from '../group-transaction.ts'
import { changePerson, changeRolesOf, removePersonFor } from '../services/people/change-person.ts'
import { addPerson, invitePersonAgain } from '../services/people/invite-person.ts'
import { listMembersPage, listPeoplePage } from '../services/people/list-people.ts'
import { readPerson } from '../services/people/person-record.ts'
import type { EndpointRouter } from './endpoint.ts'

export function peopleRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(listPeople, ({ by, query }) => inGroup(ctx, by, (tx) => listPeoplePage(tx, query)))
  endpoints.add(getPerson, ({ by, params }) => inGroup(ctx, by, (tx) => readPerson(tx, params.memberId)))
  endpoints.add(invitePerson, ({ by, params, body }) =>
    inGroup(ctx, by, (tx) => addPerson(tx, ctx, { ...params, body })),
  )
  endpoints.add(updatePerson, ({ by, params, body, version }) =>
    inGroup(ctx, by, (tx) => changePerson(tx, ctx, { ...params, version, body })),
  )
  endpoints.add(changeRoles, ({ by, params, body, version }) =>
    inGroup(ctx, by, (tx) => changeRolesOf(tx, { ...params, ...body, version })),
  )
  endpoints.add(inviteAgain, ({ by, params }) =>
    inGroup(ctx, by, (tx) => invitePersonAgain(tx, ctx, params.memberId)),
  )
  endpoints.add(removePerson, ({ by, params, body, version }) =>
    inGroup(ctx, by, (tx) => removePersonFor(tx, { ...params, ...body, version })),
  )
  endpoints.add(listMembers, ({ by, query }) => inGroup(ctx, by, (tx) => listMembersPage(tx, query)))
}
