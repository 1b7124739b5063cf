import { migrateDatabase } from '#server/db/migrate.ts'
import { startCluster, type Cluster } from '#tests/support/cluster.ts'
import { TEMPLATE, databaseUrl, onCluster } from '#tests/support/template.ts'

/** A fast cluster with the migrated template on it. */
export async function startMigratedCluster(): Promise<Cluster> {
  const cluster = await startCluster({ durable: false })
  try {
    await onCluster(cluster.url, `create database ${TEMPLATE}`)
    await migrateDatabase(databaseUrl(cluster.url, TEMPLATE))
    return cluster
  } catch (error) {
    await cluster.stop()
    throw error
  }
}
