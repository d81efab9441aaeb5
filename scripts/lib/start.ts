// What scripts/start does once Node and the npm packages are there: `start.ts SLOT [--no-demo]`.
import { join } from 'node:path'
import { DEMO_SIGN_INS } from '../demo/sign-ins.ts'
import { banner } from './banner.ts'
import { buildPart } from './built-parts.ts'
import { clusterFolder } from './cluster-folder.ts'
import { loadDemo } from './demo-step.ts'
import { Ending } from './ending.ts'
import { stateFolder } from './paths.ts'
import { ServerEnded, type ProductEnv } from './product-server.ts'
import { openDatabase, openMail } from './start-parts.ts'
import { holdPublicPort, serve } from './start-serving.ts'
import { keptSecrets } from './secrets.ts'

const [slot = 'start-1', ...options] = process.argv.slice(2)
const ending = new Ending()

/** Everything from an empty folder to a served product; each part tells `ending` how to stop it. */
async function start(): Promise<void> {
  const folder = join(stateFolder, slot)
  const clusterHome = clusterFolder(slot)
  const [database, mail, address] = await Promise.all([
    openDatabase(clusterHome, ending),
    openMail(folder, ending),
    holdPublicPort(folder),
    buildPart('client'),
    buildPart('server'),
  ])
  const env: ProductEnv = {
    NODE_ENV: 'production',
    PORT: String(address.port),
    PUBLIC_URL: address.url,
    SESSION_SECRET: process.env.SESSION_SECRET ?? keptSecrets(folder, ['session']).session,
    SMTP_URL: mail.smtpUrl,
    ...database,
  }
  const hasDemo = !options.includes('--no-demo') && (await loadDemo(env, ending))
  await serve({ env, folder, address, ending })
  const signIns = hasDemo ? DEMO_SIGN_INS : []
  const folders = [...new Set([folder, clusterHome])]
  const hasOwnData = !process.env.DATABASE_URL
  console.log(banner({ url: address.url, mailUrl: mail.pageUrl, signIns, folders, hasOwnData }))
}

ending.onSignals(() => 0)
start().catch(async (error: unknown) => {
  // A part that we are stopping ourselves also fails the start; that is no news.
  if (!ending.hasBegun) console.error(error instanceof Error ? error.message : error)
  await ending.run()
  process.exit(error instanceof ServerEnded ? error.exitCode : 1)
})
