/** Ways in which bytes are damaged on their way, or made up. */
export const DAMAGE: Record<string, (good: Uint8Array, random: () => number) => Uint8Array> = {
  'random bytes': (_, random) =>
    Uint8Array.from({ length: 1 + Math.floor(random() * 200) }, () => Math.floor(random() * 256)),
  truncated: (good, random) => good.slice(0, Math.floor(random() * good.length)),
  'one bit flipped': (good, random) => {
    const bad = good.slice()
    const at = Math.floor(random() * bad.length)
    bad[at] = (bad[at] ?? 0) ^ (1 << Math.floor(random() * 8))
    return bad
  },
  'one byte replaced': (good, random) => {
    const bad = good.slice()
    bad[Math.floor(random() * bad.length)] = Math.floor(random() * 256)
    return bad
  },
  'bytes inserted': (good, random) => {
    const at = Math.floor(random() * good.length)
    const extra = Array.from({ length: 1 + Math.floor(random() * 8) }, () => Math.floor(random() * 256))
    return Uint8Array.from([...good.slice(0, at), ...extra, ...good.slice(at)])
  },
}
