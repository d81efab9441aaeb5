import { checkOneTimeLink, requestPasswordReset, useOneTimeLink } from '#shared/contracts/one-time-links.ts'
import type { AppContext } from '../context.ts'
import * as resetService from '../services/sign-in/request-password-reset.ts'
import { describeLink, setPasswordByLink } from '../services/sign-in/use-one-time-link.ts'
import type { EndpointRouter } from './endpoint.ts'

export function oneTimeLinkRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  const desk = resetService.resetDesk(ctx)
  endpoints.add(requestPasswordReset, async ({ body, actor }) => {
    await resetService.requestPasswordReset(desk, { email: body.email, actor: signedOut(actor) })
    return { status: 'accepted' as const }
  })
  endpoints.add(checkOneTimeLink, ({ body, actor }) => describeLink(ctx, signedOut(actor), body.token))
  endpoints.add(useOneTimeLink, ({ body, actor }) => setPasswordByLink(ctx, signedOut(actor), body))
}

/** Whoever is signed in here acts as the holder of the link, not as themselves: they may be of another group. */
function signedOut<A extends { memberId: string | null; name: string }>(actor: A): A {
  return { ...actor, memberId: null, name: 'Signed out' }
}
