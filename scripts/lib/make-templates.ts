// Makes the template databases on the cluster that HALYARD_TEST_PG names and prints their names as JSON.
import { ensureDemoTemplate, ensureTemplate } from './template-database.ts'
import { openTestCluster } from './test-cluster.ts'

const testPg = await openTestCluster()
const empty = await ensureTemplate(testPg)
const demo = await ensureDemoTemplate(testPg)
await testPg.stop()
console.log(JSON.stringify({ empty, demo }))
