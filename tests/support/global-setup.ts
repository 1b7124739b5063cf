import type { TestProject } from 'vitest/node'
import { migrateDatabase } from '#server/db/migrate.ts'
import { startCluster, type Cluster } from '#tests/support/cluster.ts'
import { TEMPLATE, databaseUrl, onCluster } from '#tests/support/template.ts'

declare module 'vitest' {
  // eslint-disable-next-line @typescript-eslint/consistent-type-definitions -- only an interface can be added to
  export interface ProvidedContext {
    pgUrl: string
  }
}

// Two projects need the cluster and share one; the last to leave stops it.
let starting: Promise<Cluster> | undefined
let users = 0

async function startMigrated(): Promise<Cluster> {
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

export async function setup(project: TestProject): Promise<() => Promise<void>> {
  users += 1
  starting ??= startMigrated()
  const cluster = await starting
  project.provide('pgUrl', cluster.url)
  return async () => {
    users -= 1
    if (users === 0) await cluster.stop()
  }
}
