import { healthCheck, readyCheck } from '#shared/contracts/health.ts'
import type { AppContext } from '../context.ts'
import type { EndpointRouter } from './endpoint.ts'

export function healthRoutes(endpoints: EndpointRouter, { db }: AppContext): void {
  endpoints.add(healthCheck, async () => ({ status: 'ok' as const }))
  endpoints.add(readyCheck, async () => {
    await db.query('SELECT 1')
    return { status: 'ready' as const }
  })
}
