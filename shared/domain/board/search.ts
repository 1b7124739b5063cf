/** A thing on the wall that can be found by its words. */
export type Searchable = { id: string; words: string }

function plain(text: string): string {
  return text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase()
}

/** Ids of all that hold every word of the query, in the order given; case and accents do not matter. An empty query finds nothing. */
export function searchBoard(items: readonly Searchable[], query: string): string[] {
  const words = plain(query)
    .split(/\s+/)
    .filter((word) => word !== '')
  if (words.length === 0) return []
  return items
    .filter((item) => {
      const text = plain(item.words)
      return words.every((word) => text.includes(word))
    })
    .map((item) => item.id)
}
