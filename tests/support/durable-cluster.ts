import { startCluster, type Cluster } from '#tests/support/cluster.ts'

/**
 * A cluster of its own with fsync, synchronous_commit and full_page_writes on: the only kind on which
 * "acknowledged means kept" can be tested. Stop it when done.
 */
export function startDurableCluster(): Promise<Cluster> {
  return startCluster({ durable: true })
}
