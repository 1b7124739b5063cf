import { connectDatabase } from '#server/db/client.ts'
import { createCompaction } from '#server/realtime/compaction.ts'
import { DEFAULT_SETTINGS } from '#server/realtime/settings.ts'
import { docIdSchema } from '#shared/ids.ts'
import { openRoom, quiet } from './opened-room.ts'

/** Edits a document and compacts it without end, to be killed. Prints `stored <n>` for every edit that is in the log. */
const databaseUrl = process.env['DATABASE_URL']
if (databaseUrl === undefined) throw new Error('DATABASE_URL is not set')
const { pool } = connectDatabase(databaseUrl, () => undefined, 4)
const settings = { ...DEFAULT_SETTINGS, compactIdleRows: 1, compactEveryMs: 0 }
const { room, updateLog, edit } = await openRoom({ pool, docId: docIdSchema.parse(process.env['DOC_ID']), settings })
const compaction = createCompaction({ pool, databaseUrl, updateLog, isAlone: () => true, settings, log: quiet })
const stored = room.doc.getMap<number>('stored')
for (let n = stored.size; ; n++) {
  await edit(null, () => {
    stored.set(`${n}`, n)
    if (n % 3 === 2) stored.set(`${n - 1}`, -1)
  })
  process.stdout.write(`stored ${n}\n`)
  if (n % 10 === 9) {
    await compaction.beforeUnload(room)
    process.stdout.write(`compacted ${compaction.stats().compactions}\n`)
  }
}
