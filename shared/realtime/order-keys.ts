import { generateKeyBetween } from 'fractional-indexing'

/**
 * Order as a key on the item: base-62 fractional keys compared by code unit, never a position in an array.
 * Three random halvings keep two people from picking the same key in the same gap.
 */

/**
 * A key strictly between two neighbours (null: the open end), unlikely to be chosen by anyone else at the same time.
 *
 * @throws when `before` is not below `after`.
 */
export function keyBetween(before: string | null, after: string | null, random: () => number): string {
  let key = generateKeyBetween(before, after)
  for (let halving = 0; halving < 3; halving++) {
    key = random() < 0.5 ? generateKeyBetween(before, key) : generateKeyBetween(key, after)
  }
  return key
}

/** A key behind all of these. */
export function appendKey(keys: readonly string[], random: () => number): string {
  const last = keys.reduce<string | null>((top, key) => (top === null || key > top ? key : top), null)
  return keyBetween(last, null, random)
}

export type Placed = { id: string; key: string }

/** By key, ties by id: the same on every device. */
export function byKey(a: Placed, b: Placed): number {
  if (a.key !== b.key) return a.key < b.key ? -1 : 1
  return a.id < b.id ? -1 : a.id > b.id ? 1 : 0
}

/**
 * New keys that put `id` directly behind `afterId` (null: first) in an ordered list. Usually one key; when
 * neighbours hold equal keys, the run of equals behind is re-keyed too. The caller writes all of them in one transaction.
 */
export function keysToPlace(
  list: readonly Placed[],
  id: string,
  afterId: string | null,
  random: () => number,
): Map<string, string> {
  const others = list.filter((item) => item.id !== id).sort(byKey)
  const at = afterId === null ? 0 : others.findIndex((item) => item.id === afterId) + 1
  const before = others[at - 1]?.key ?? null
  let behind = at
  while (behind < others.length && before !== null && (others[behind]?.key ?? '') <= before) behind++
  const after = others[behind]?.key ?? null
  const keys = new Map<string, string>()
  let key = keyBetween(before, after, random)
  keys.set(id, key)
  for (const item of others.slice(at, behind)) {
    key = keyBetween(key, after, random)
    keys.set(item.id, key)
  }
  return keys
}
