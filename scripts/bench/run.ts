// Measures the budgets of the board, of recording, signing in, tags, jobs and live updates, each as a ratio to a floor of the same run.
import { openTestCluster } from '../lib/test-cluster.ts'
import { cloneDatabase } from '../lib/clone-database.ts'
import { ensureDemoTemplate } from '../lib/template-database.ts'
import { benchBoard } from './board.ts'
import { startBenchProduct } from './bench-product.ts'
import { benchJobs } from './jobs.ts'
import { benchLive } from './live.ts'
import { benchRecording } from './recording.ts'
import { printHead, printRows } from './report.ts'
import { benchSignIn } from './sign-in.ts'
import { benchTags } from './tags.ts'
import { givenThousandKits } from './thousand-kits.ts'

const cluster = await openTestCluster()
try {
  const database = await cloneDatabase(cluster, await ensureDemoTemplate(cluster))
  await givenThousandKits(database.ownerUrl)
  const product = await startBenchProduct(database)
  try {
    printHead()
    for (const bench of [benchBoard, benchRecording, benchSignIn, benchLive, benchJobs, benchTags]) {
      printRows(await bench(product))
    }
  } finally {
    await product.stop()
    await database.drop()
  }
} finally {
  await cluster.stop()
}
