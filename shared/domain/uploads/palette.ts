import {
  type Oklab,
  type Rgb,
  converter,
  differenceCiede2000,
  formatHex,
  modeLab65,
  modeOklab,
  modeRgb,
  useMode,
} from 'culori/fn'

useMode(modeRgb)
useMode(modeOklab)
useMode(modeLab65)

const toOklab = converter('oklab')
const apart = differenceCiede2000()

/** Clusters to begin with; near ones are merged afterwards. */
const SEEDS = 14
const ROUNDS = 12
/** Two colours nearer than this (ΔE 2000) are one to the eye in a small swatch; common practice, no source. */
const SAME_BELOW = 6
/** A cluster with less of the picture than this is noise. */
const LEAST_SHARE = 0.003

type Point = { l: number; a: number; b: number; weight: number }

/**
 * The colours a picture is made of, most of it first, `#rrggbb` in sRGB: k-means in OKLab from fixed seeds, near
 * clusters merged by ΔE 2000. The same pixels always give the same palette. Fewer than `count` when there are no more.
 *
 * @param rgb interleaved 8-bit sRGB, three bytes a pixel.
 */
export function paletteOf(rgb: Uint8Array, count: number): string[] {
  const points = weighed(rgb)
  const total = points.reduce((sum, point) => sum + point.weight, 0)
  let clusters = cluster(points, seedsOf(points))
  const loud = clusters.filter((one) => one.weight >= total * LEAST_SHARE)
  if (loud.length > 0) clusters = loud
  for (;;) {
    const pair = nearestPair(clusters)
    if (!pair || (clusters.length <= count && pair.distance >= SAME_BELOW)) break
    clusters = clusters.filter((one) => one !== pair.first && one !== pair.second)
    clusters.push(mean([pair.first, pair.second]))
  }
  return clusters.sort((x, y) => y.weight - x.weight || x.l - y.l).map((one) => formatHex(colourOf(one)))
}

function colourOf({ l, a, b }: Point): Oklab {
  return { mode: 'oklab', l, a, b }
}

/** Pixels put together by their upper five bits a channel, so that large pictures cost no more than small ones. */
function weighed(rgb: Uint8Array): Point[] {
  const bins = new Map<number, { r: number; g: number; b: number; weight: number }>()
  for (let at = 0; at + 2 < rgb.length; at += 3) {
    const [r = 0, g = 0, b = 0] = rgb.subarray(at, at + 3)
    const key = ((r >> 3) << 10) | ((g >> 3) << 5) | (b >> 3)
    const bin = bins.get(key)
    if (bin) {
      bin.r += r
      bin.g += g
      bin.b += b
      bin.weight += 1
    } else bins.set(key, { r, g, b, weight: 1 })
  }
  return [...bins.entries()]
    .sort(([x], [y]) => x - y)
    .map(([, { r, g, b, weight }]) => {
      const scale = 255 * weight
      const colour: Rgb = { mode: 'rgb', r: r / scale, g: g / scale, b: b / scale }
      const lab = toOklab(colour)
      return { l: lab.l, a: lab.a, b: lab.b, weight }
    })
}

/** The heaviest point, then again and again the one that is both heavy and far from all chosen. No chance in it. */
function seedsOf(points: readonly Point[]): Point[] {
  const seeds: Point[] = []
  const distances = points.map(() => Infinity)
  while (seeds.length < Math.min(SEEDS, points.length)) {
    let best: Point | undefined
    let most = -1
    points.forEach((point, index) => {
      const score = seeds.length === 0 ? point.weight : Math.sqrt(point.weight) * (distances[index] ?? 0)
      if (score > most) {
        most = score
        best = point
      }
    })
    if (!best || most <= 0) break
    const seed = best
    seeds.push(seed)
    points.forEach((point, index) => {
      distances[index] = Math.min(distances[index] ?? Infinity, squared(point, seed))
    })
  }
  return seeds
}

function cluster(points: readonly Point[], seeds: readonly Point[]): Point[] {
  let centres = [...seeds]
  for (let round = 0; round < ROUNDS; round++) {
    const groups: Point[][] = centres.map(() => [])
    for (const point of points) {
      let nearest = 0
      let least = Infinity
      centres.forEach((centre, index) => {
        const distance = squared(point, centre)
        if (distance < least) {
          least = distance
          nearest = index
        }
      })
      groups[nearest]?.push(point)
    }
    centres = groups.filter((group) => group.length > 0).map(mean)
  }
  return centres
}

function mean(group: readonly Point[]): Point {
  const weight = group.reduce((sum, point) => sum + point.weight, 0)
  const of = (channel: 'l' | 'a' | 'b') => group.reduce((sum, point) => sum + point[channel] * point.weight, 0) / weight
  return { l: of('l'), a: of('a'), b: of('b'), weight }
}

function squared(x: Point, y: Point): number {
  return (x.l - y.l) ** 2 + (x.a - y.a) ** 2 + (x.b - y.b) ** 2
}

function nearestPair(clusters: readonly Point[]): { first: Point; second: Point; distance: number } | undefined {
  let nearest: { first: Point; second: Point; distance: number } | undefined
  clusters.forEach((first, index) => {
    for (const second of clusters.slice(index + 1)) {
      const distance = apart(colourOf(first), colourOf(second))
      if (!nearest || distance < nearest.distance) nearest = { first, second, distance }
    }
  })
  return nearest
}
