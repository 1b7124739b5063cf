/**
 * Hocuspocus as its documentation shows it: the database extension, one row a document, default debounce. The packages
 * come from the folder of each version.
 */
export async function serveHocuspocus({ Server, Database, pg, table }) {
  const pool = new pg.Pool({ connectionString: process.env.DATABASE_URL, max: 4 })
  // A lost idle connection is no reason to end.
  pool.on('error', () => undefined)
  await pool.query(`create table if not exists ${table} (name text primary key, data bytea not null)`)
  const server = new Server({
    port: Number(process.env.PORT),
    address: process.env.HOST,
    quiet: true,
    extensions: [
      new Database({
        fetch: async ({ documentName }) => {
          const { rows } = await pool.query(`select data from ${table} where name = $1`, [documentName])
          return rows[0]?.data ?? null
        },
        store: async ({ documentName, state }) => {
          await pool.query(
            `insert into ${table} (name, data) values ($1, $2) on conflict (name) do update set data = $2`,
            [documentName, state],
          )
        },
      }),
    ],
  })
  await server.listen()
}
