import type { TestProject } from 'vitest/node'
import type { Cluster } from '#tests/support/cluster.ts'
import { startMigratedCluster } from '#tests/support/migrated-cluster.ts'

declare module 'vitest' {
  // eslint-disable-next-line @typescript-eslint/consistent-type-definitions -- only an interface can be added to
  export interface ProvidedContext {
    pgUrl: string
  }
}

// Two projects need the cluster and share one; the last to leave stops it.
let starting: Promise<Cluster> | undefined
let users = 0

export async function setup(project: TestProject): Promise<() => Promise<void>> {
  users += 1
  starting ??= startMigratedCluster()
  const cluster = await starting
  project.provide('pgUrl', cluster.url)
  return async () => {
    users -= 1
    if (users === 0) await cluster.stop()
  }
}
