// What a database holds, in numbers that can be compared: rows and a content hash for each table, and how far each
// sequence has come.

/**
 * @typedef {import('pg').Client} Client
 * @typedef {import('./archive.mjs').TableSum} TableSum
 *
 * The hash does not depend on the order of rows: it adds up both halves of every row's MD5. That finds
 * mistakes, which is what it is for; it is no seal against somebody who forges a row.
 *
 * @param {Client} client in a transaction, where others may write meanwhile
 * @returns {Promise<{ tables: Record<string, TableSum>, sequences: Record<string, string>, lastMigrationMs: number }>}
 */
export async function contentsOf(client) {
  // A row is hashed as text, so how values are written has to be the same on both sides.
  await client.query(
    "set local timezone = 'UTC'; set local datestyle = 'ISO, YMD'; set local intervalstyle = 'iso_8601';" +
      "set local bytea_output = 'hex'; set local extra_float_digits = 1; set local search_path = pg_catalog",
  )
  const found = await client.query(
    'select schemaname, tablename from pg_tables ' +
      "where schemaname not in ('pg_catalog', 'information_schema') order by schemaname, tablename",
  )
  /** @type {Record<string, TableSum>} */
  const tables = {}
  for (const { schemaname, tablename } of found.rows) {
    const table = `${client.escapeIdentifier(schemaname)}.${client.escapeIdentifier(tablename)}`
    const sums = await client.query(
      `select count(*)::text as rows,
              concat_ws(' ', sum(('x' || substr(h, 1, 16))::bit(64)::bigint), sum(('x' || substr(h, 17))::bit(64)::bigint)) as content
       from (select md5(t::text) as h from ${table} t) hashed`,
    )
    tables[`${schemaname}.${tablename}`] = sums.rows[0]
  }
  const counters = await client.query(
    "select schemaname || '.' || sequencename as name, coalesce(last_value, 0)::text as value from pg_sequences",
  )
  const migrations = tables['drizzle.__drizzle_migrations']
    ? await client.query('select coalesce(max(created_at), 0)::text as last from drizzle.__drizzle_migrations')
    : undefined
  return {
    tables,
    sequences: Object.fromEntries(counters.rows.map((row) => [row.name, row.value])),
    lastMigrationMs: Number(migrations?.rows[0].last ?? 0),
  }
}

/**
 * What a restored database has otherwise than its backup said, in sentences. A sequence may be further
 * on: it is not part of the snapshot.
 *
 * @param {Pick<Awaited<ReturnType<typeof contentsOf>>, 'tables' | 'sequences'>} wanted
 * @param {Pick<Awaited<ReturnType<typeof contentsOf>>, 'tables' | 'sequences'>} found
 * @returns {string[]}
 */
export function differences(wanted, found) {
  const lines = []
  for (const [name, { rows, content }] of Object.entries(wanted.tables)) {
    const table = found.tables[name]
    if (table === undefined) lines.push(`Table ${name} is missing.`)
    else if (table.rows !== rows) lines.push(`Table ${name} has ${table.rows} rows instead of ${rows}.`)
    else if (table.content !== content) lines.push(`Table ${name} has other content.`)
  }
  for (const name of Object.keys(found.tables)) {
    if (wanted.tables[name] === undefined) lines.push(`Table ${name} is not in the backup.`)
  }
  for (const [name, value] of Object.entries(wanted.sequences)) {
    const reached = found.sequences[name]
    if (reached === undefined || BigInt(reached) < BigInt(value)) lines.push(`Sequence ${name} is behind.`)
  }
  return lines
}

/** @param {Record<string, TableSum>} tables */
export function describeTables(tables) {
  const rows = Object.values(tables).reduce((sum, table) => sum + Number(table.rows), 0)
  return `${Object.keys(tables).length} tables with ${rows} rows`
}
