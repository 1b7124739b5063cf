import { randomBytes } from 'node:crypto'
import pg from 'pg'
import * as Y from 'yjs'
import { until } from '#tests/realtime/support/client.ts'
import type { HostileCase } from './stage.ts'

const STORED_MS = 5_000

/** Updates as the log would hold them: whole ones before and after some that are none. */
function rows(): { good: Uint8Array[]; bad: Uint8Array[] } {
  const doc = new Y.Doc()
  const good: Uint8Array[] = []
  doc.on('update', (update: Uint8Array) => good.push(update))
  doc.getMap('items').set('first', new Y.Map([['kind', 'card']]))
  doc.getMap('items').set('second', new Y.Map([['kind', 'card']]))
  const elsewhere = new Y.Doc()
  const gap: Uint8Array[] = []
  elsewhere.on('update', (update: Uint8Array) => gap.push(update))
  elsewhere.getMap('x').set('k', 1)
  elsewhere.getMap('x').set('k', 2)
  const truncated = good[1]?.slice(0, -5) ?? new Uint8Array()
  const bad = [new Uint8Array(0), randomBytes(50), truncated, gap[1] ?? new Uint8Array(), new Uint8Array(32).fill(255)]
  return { good, bad }
}

export const badRows: HostileCase = {
  name: 'malformed rows in the log',
  isFor: (target) => target.name === 'sconce',
  run: async ({ server, database, document, open }) => {
    const { good, bad } = rows()
    const [first, second] = good
    if (!first || !second) throw new Error('no updates were made')
    const client = new pg.Client({ connectionString: database.url })
    await client.connect()
    try {
      const all = [first, ...bad, second]
      await client.query(
        `with grown as (update rt_doc set head = head + $2, log_rows = log_rows + $2 where id = $1 returning head)
         insert into rt_update (doc_id, seq, update)
         select $1, grown.head - $2 + r.place, r.update
         from grown, unnest($3::bytea[]) with ordinality as r(update, place)`,
        [document.docId, all.length, all.map((update) => Buffer.from(update))],
      )
      const newcomer = open(0)
      await newcomer.connect()
      const items = [...newcomer.items.keys()].sort()
      newcomer.items.set('third', new Y.Map([['kind', 'card']]))
      const isStored = await until(() => newcomer.acked === newcomer.sent, STORED_MS).then(
        () => true,
        () => false,
      )
      const countAside = async () =>
        (await client.query('select from rt_quarantine where doc_id = $1', [document.docId])).rowCount ?? 0
      await until(async () => (await countAside()) >= bad.length, STORED_MS).catch(() => undefined)
      const putAside = await countAside()
      return [
        {
          question: 'malformed rows in the log leave the rest readable and writable',
          isGood: server.isAlive() && items.join() === 'first,second' && isStored && putAside === bad.length,
          detail: `${items.length} of 2 items, ${isStored ? 'an edit was kept' : 'no edit was kept'}, ${putAside} of ${bad.length} rows put aside`,
        },
      ]
    } finally {
      await client.end()
    }
  },
}
