import * as Y from 'yjs'

/** Enough for any edit by hand; a whole document handed back names its first so many. */
const MAX_TOUCHED = 2000
/** Ids become text in the database, which takes no NUL; anything else is not an id of ours. */
const ITEM_ID = /^[\w:.-]{1,64}$/

/** Ids of the items that a transaction changed: the keys directly below the document's root maps. */
export function itemsTouchedBy(transaction: Y.Transaction, into: Set<string>): void {
  for (const [type, keys] of transaction.changed) {
    if (into.size >= MAX_TOUCHED) return
    const item = itemHolding(type)
    if (item !== null) add(into, item)
    else for (const key of keys) if (key !== null && into.size < MAX_TOUCHED) add(into, key)
  }
}

function add(into: Set<string>, id: string): void {
  if (ITEM_ID.test(id)) into.add(id)
}

type AnyType = Parameters<Y.Transaction['changed']['get']>[0]

/** The key below a root under which this type lies, or null when it is a root. */
function itemHolding(type: AnyType): string | null {
  const holder = type._item
  if (holder === null) return null
  const { parent } = holder
  return (isType(parent) ? itemHolding(parent) : null) ?? holder.parentSub
}

function isType(parent: unknown): parent is AnyType {
  return parent instanceof Y.AbstractType
}
