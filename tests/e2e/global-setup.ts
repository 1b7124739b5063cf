import { startAppProcess } from '#tests/support/app-process.ts'
import { cloneTemplate } from '#tests/support/template.ts'
import { startMigratedCluster } from '#tests/support/migrated-cluster.ts'

/** One cluster, one database with the demo shoot, one server for the whole run. */
export default async function setup(): Promise<() => Promise<void>> {
  const cluster = await startMigratedCluster()
  try {
    const database = await cloneTemplate(cluster.url)
    const app = await startAppProcess({ databaseUrl: database.url, env: { SCONCE_DEMO: '1' } })
    process.env['SCONCE_E2E_URL'] = app.url
    process.env['SCONCE_E2E_DATABASE'] = database.url
    return async () => {
      await app.stop()
      await cluster.stop()
    }
  } catch (error) {
    await cluster.stop()
    throw error
  }
}
