import pg from 'pg'
import { migrateDatabase } from '#server/db/migrate.ts'
import { type AppProcess, startAppProcess } from '#tests/support/app-process.ts'
import type { Cluster } from '#tests/support/cluster.ts'
import { startDurableCluster } from '#tests/support/durable-cluster.ts'
import { databaseUrl, onCluster } from '#tests/support/template.ts'

export type StorySite = {
  url: string
  databaseUrl: string
  /** kill -9, while people work. */
  kill: () => Promise<void>
  /** Starts it again at the same address. */
  startAgain: () => Promise<void>
  close: () => Promise<void>
}

/** An empty Sconce of its own on a cluster that really writes to the disk: nothing but the migrations is in it. */
export async function openStorySite(): Promise<StorySite> {
  const cluster: Cluster = await startDurableCluster()
  let app: AppProcess | undefined
  try {
    await onCluster(cluster.url, 'create database story')
    const url = databaseUrl(cluster.url, 'story')
    await migrateDatabase(url)
    app = await startAppProcess({ databaseUrl: url })
    const { port } = app
    return {
      url: app.url,
      databaseUrl: url,
      kill: async () => {
        await app?.kill()
      },
      startAgain: async () => {
        app = await startAppProcess({ databaseUrl: url, port })
      },
      close: async () => {
        await app?.stop()
        await cluster.stop()
      },
    }
  } catch (error) {
    await app?.stop()
    await cluster.stop()
    throw error
  }
}

/** Every text that the log of updates holds: what a restart would find, whatever was written over it later. */
export async function everythingEverWritten(url: string): Promise<string> {
  const client = new pg.Client({ connectionString: url })
  await client.connect()
  try {
    const { rows } = await client.query<{ update: Buffer }>('select update from rt_update order by seq')
    return rows.map((row) => row.update.toString('utf8')).join('\n')
  } finally {
    await client.end()
  }
}
