import { randomBytes } from 'node:crypto'
import pg from 'pg'

export type TestDatabase = {
  url: string
  drop: () => Promise<void>
}

/** The migrated database that every test database is a copy of. */
export const TEMPLATE = 'sconce_template'

/** A copy of the template on the cluster with this superuser's address. */
export async function cloneTemplate(clusterUrl: string): Promise<TestDatabase> {
  const name = `t_${randomBytes(6).toString('hex')}`
  await onCluster(clusterUrl, `create database ${name} template ${TEMPLATE}`)
  return {
    url: databaseUrl(clusterUrl, name),
    drop: () => onCluster(clusterUrl, `drop database if exists ${name} with (force)`),
  }
}

export function databaseUrl(clusterUrl: string, name: string): string {
  const url = new URL(clusterUrl)
  url.pathname = `/${name}`
  return url.href
}

export async function onCluster(clusterUrl: string, statement: string): Promise<void> {
  const client = new pg.Client({ connectionString: clusterUrl })
  await client.connect()
  try {
    await client.query(statement)
  } finally {
    await client.end()
  }
}
