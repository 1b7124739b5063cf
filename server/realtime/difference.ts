import { isDeepStrictEqual } from 'node:util'
import * as Y from 'yjs'

/** `clocks`: they know of different edits. `deletions`: they hold different things as deleted. */
export type Difference = 'clocks' | 'deletions' | 'content'

/**
 * How two documents differ, or null. Bytes cannot be compared: equal documents are encoded in pieces that depend on
 * the way they were built. What the edits are, what is deleted and what can be read does not. For documents whose root
 * types were not asked for by name, as they come from their encoded state.
 */
export function differenceOf(a: Y.Doc, b: Y.Doc): Difference | null {
  if (!isDeepStrictEqual(clocksOf(a), clocksOf(b))) return 'clocks'
  const deletions = (doc: Y.Doc) => Y.createDeleteSetFromStructStore(doc.store)
  if (!Y.equalDeleteSets(deletions(a), deletions(b))) return 'deletions'
  for (const name of new Set([...a.share.keys(), ...b.share.keys()])) {
    if (!isDeepStrictEqual(contentOf(a.share.get(name)), contentOf(b.share.get(name)))) return 'content'
  }
  return null
}

function clocksOf(doc: Y.Doc): Map<number, number> {
  return Y.decodeStateVector(Y.encodeStateVector(doc))
}

type AnyType = Parameters<Y.Transaction['changed']['get']>[0]

/** All that can be read of a type, whether it is used as a map, a list or a text; a root that is not there is empty. */
function contentOf(type: AnyType | undefined): { map: Map<string, unknown>; list: unknown[] } {
  const map = new Map<string, unknown>()
  const list: unknown[] = []
  for (const [key, item] of type?._map ?? []) if (!item.deleted) map.set(key, valuesOf(item).at(-1))
  for (let item = type?._start ?? null; item !== null; item = item.right) {
    if (!item.deleted) for (const value of valuesOf(item)) list.push(value)
  }
  return { map, list }
}

function valuesOf({ content }: Y.Item): unknown[] {
  if (content instanceof Y.ContentType) return [[content.type.constructor.name, contentOf(content.type)]]
  if (content instanceof Y.ContentFormat) return [{ [content.key]: content.value as unknown }]
  if (content instanceof Y.ContentDoc) return [content.doc.guid]
  return content.getContent()
}
