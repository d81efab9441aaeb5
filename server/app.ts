import { join } from 'node:path'
import express, { type Express } from 'express'
import type { AppContext } from './context.ts'
import { AppError } from './errors.ts'
import { auditRefusals } from './middleware/audit-refusals.ts'
import { problemHandler } from './middleware/problem-handler.ts'
import { requestId } from './middleware/request-id.ts'
import { requireSameOrigin } from './middleware/require-same-origin.ts'
import { securityHeaders } from './middleware/security-headers.ts'
import { readSession } from './middleware/session.ts'
import { staticFiles } from './middleware/static-files.ts'
import { boardPage } from './routes/board-page.ts'
import { EndpointRouter } from './routes/endpoint.ts'
import { addRoutes } from './routes/index.ts'
import { methodGuard } from './routes/method-guard.ts'
import { openApiDocument } from './routes/open-api.ts'

/** Mail programs post to these without an origin (RFC 8058). */
const OPEN_TO_MAIL = /^\/api\/v1\/reminder-links\/[^/]+\/stop$/

/** One folder up from here, and from `dist-server`, where the built server is. */
const BUILT_CLIENT = join(import.meta.dirname, '../dist')

/** Middleware and routes; never listens. */
export function createApp(ctx: AppContext): Express {
  const app = express()
  app.disable('x-powered-by')
  app.disable('etag')
  app.set('query parser', false)
  app.set('case sensitive routing', true)
  app.set('strict routing', true)
  app.set('trust proxy', ctx.config.trustProxy)
  app.use(requestId(ctx))
  app.use(securityHeaders())
  app.use(requireSameOrigin(ctx.config, OPEN_TO_MAIL))
  const session = readSession(ctx)
  app.use('/api', session)

  const endpoints = new EndpointRouter(app)
  addRoutes(endpoints, ctx)
  const document = JSON.stringify(openApiDocument(endpoints.endpoints))
  app.get('/api/v1/openapi.json', (_req, res) => void res.type('json').send(document))
  app.use(methodGuard(endpoints.endpoints))
  app.use(boardPage(ctx, { folder: BUILT_CLIENT, session }), staticFiles(BUILT_CLIENT))
  app.use((req) => {
    throw new AppError('not-found', `Nothing answers at ${req.path.slice(0, 200)}.`)
  })
  app.use(auditRefusals(ctx))
  app.use(problemHandler(ctx))
  return app
}
