import * as Y from 'yjs'
import { examine } from './guard.ts'

/** Applies a made-up document a few times, so that the first person is not the one who waits for the compiler. */
export function warmUp(): void {
  const source = new Y.Doc()
  source.transact(() => {
    const items = source.getMap('items')
    for (let i = 0; i < 1000; i++)
      items.set(
        `item-${i}`,
        new Y.Map<unknown>([
          ['box', [i, i, 120, 80]],
          ['text', `item ${i}`],
        ]),
      )
  })
  const update = Y.encodeStateAsUpdate(source)
  for (let round = 0; round < 5; round++) {
    const doc = new Y.Doc()
    examine(doc, update)
    Y.applyUpdate(doc, update)
    doc.destroy()
  }
  source.destroy()
}
