import { useId, useMemo } from 'react'
import { type Orientation, rayThrough, viewOf } from '#shared/domain/lighting/frame.ts'
import type { Point } from '#shared/domain/lighting/schema.ts'
import { SHOULDERS_BELOW_EYES_M, type WallMap, glowOf, wallMap } from '#shared/domain/lighting/wall.ts'
import { wallContours } from '#shared/domain/lighting/wall-contours.ts'
import { fNumberLabel, stopsLabel } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'

/** Greys of the wall by how far it is under the main, brightest first; the last one is all below. */
const STEPS = [
  { below: 0, colour: '#ffffff', words: 'over the main' },
  { below: 1, colour: '#e4e1da', words: '0 to −1' },
  { below: 2, colour: '#c2beb6', words: '−1 to −2' },
  { below: 3, colour: '#9b968e', words: '−2 to −3' },
  { below: 4, colour: '#75706a', words: '−3 to −4' },
  { below: 5, colour: '#524e49', words: '−4 to −5' },
  { below: 6, colour: '#353230', words: '−5 to −6' },
  { below: Infinity, colour: '#1b1918', words: 'darker' },
] as const

const stepOf = (stops: number) => STEPS.find((step) => stops < step.below) ?? STEPS[STEPS.length - 1]

/** Points of the map across and down. */
const COLUMNS = 96
const ROWS = 120
/** Half widths of a head and of shoulders, and the crown above the eyes, metres (assumed measures). */
const HEAD_HALF_M = 0.09
const SHOULDER_HALF_M = 0.22
const CROWN_M = 0.13
const CHIN_M = 0.11

type Row = WallMap['underMainStops'][number]

/** A row whose ends are taken from beside them, so that the picture's slanted edge can cut it. */
function filled(row: Row): Row {
  const first = row.findIndex((value) => value !== null)
  const last = row.findLastIndex((value) => value !== null)
  return first < 0 ? row : row.map((_, index) => row[Math.min(last, Math.max(first, index))] ?? null)
}

/** Cells of one step as one path: runs of neighbours in a row are one rectangle. */
function cellPaths(map: WallMap): { colour: string; path: string }[] {
  const cellX = ((map.xM.at(-1) ?? 0) - (map.xM[0] ?? 0)) / (COLUMNS - 1)
  const cellY = ((map.yM[0] ?? 0) - (map.yM.at(-1) ?? 0)) / (ROWS - 1)
  const paths = new Map<string, string[]>()
  const seen = map.underMainStops.map(filled)
  const firstSeen = seen.findIndex((row) => row.some((value) => value !== null))
  const lastSeen = seen.findLastIndex((row) => row.some((value) => value !== null))
  seen.forEach((own, rowIndex) => {
    const row = seen[Math.min(lastSeen, Math.max(firstSeen, rowIndex))] ?? own
    const y = -(map.yM[rowIndex] ?? 0) - cellY / 2
    let from = 0
    for (let column = 1; column <= row.length; column++) {
      const value = row[from]
      const colour = value === null || value === undefined ? null : stepOf(value)?.colour
      const next = row[column]
      const nextColour = next === null || next === undefined ? null : stepOf(next)?.colour
      if (column < row.length && nextColour === colour) continue
      if (colour) {
        const x = (map.xM[from] ?? 0) - cellX / 2
        const run = `M${x.toFixed(3)} ${y.toFixed(3)}h${((column - from) * cellX * 1.002).toFixed(3)}v${(cellY * 1.02).toFixed(3)}H${x.toFixed(3)}z`
        const runs = paths.get(colour)
        if (runs) runs.push(run)
        else paths.set(colour, [run])
      }
      from = column
    }
  })
  return [...paths].map(([colour, runs]) => ({ colour, path: runs.join('') }))
}

type WallViewProps = { whole: WholeSetup; orientation: Orientation }

/** What the lights make of the wall that the camera sees, in stops against the main, with the sitter before it. */
export function WallView({ whole, orientation }: WallViewProps) {
  const clipId = useId()
  const map = useMemo(() => wallMap(whole, { columns: COLUMNS, rows: ROWS, orientation }), [whole, orientation])
  const cells = useMemo(() => (map ? cellPaths(map) : []), [map])
  const contours = useMemo(() => (map ? wallContours(map) : []), [map])
  const glow = useMemo(() => glowOf(whole, orientation), [whole, orientation])
  if (!map) {
    return (
      <p className="max-w-md text-base text-ink-soft">
        There is no wall to read: the camera sees none of it, or there is no main that is on to compare it with.
      </p>
    )
  }
  const { view, zM } = { view: viewOf(whole, orientation), zM: whole.setup.background.zM }
  /** Where the line from the camera through a point meets the wall, as drawn. */
  const onWall = (point: Point): string => {
    const share = (zM - view.at[2]) / (point[2] - view.at[2])
    const x = view.at[0] + (point[0] - view.at[0]) * share
    const y = view.at[1] + (point[1] - view.at[1]) * share
    return `${x.toFixed(3)} ${(-y).toFixed(3)}`
  }
  const corners = (
    [
      [-1, 1],
      [1, 1],
      [1, -1],
      [-1, -1],
    ] as const
  ).map(([across, up]) => {
    const ray = rayThrough(view, across, up)
    return onWall([view.at[0] + ray[0], view.at[1] + ray[1], view.at[2] + ray[2]])
  })
  const sitters = whole.places.filter((place) => place.at[1] < view.at[2] - 0.1)
  const halfX = ((map.xM.at(-1) ?? 0) - (map.xM[0] ?? 0)) / (COLUMNS - 1) / 2
  const halfY = ((map.yM[0] ?? 0) - (map.yM.at(-1) ?? 0)) / (ROWS - 1) / 2
  const [left, right] = [(map.xM[0] ?? 0) - halfX, (map.xM.at(-1) ?? 0) + halfX]
  const [top, bottom] = [(map.yM[0] ?? 0) + halfY, (map.yM.at(-1) ?? 0) - halfY]
  const pad = Math.max(0.04, (right - left) * 0.04)
  const box = [left - pad, -top - pad, right - left + 2 * pad, top - bottom + 2 * pad]
  const thin = (right - left) / 320
  const peak = glow?.point
  return (
    <svg
      viewBox={box.join(' ')}
      className="block h-full max-h-[70dvh] w-full md:max-h-full"
      role="img"
      aria-label={`The wall behind the sitter in stops against the main${
        glow && glow.underMainStops !== null ? `; brightest ${stopsLabel(-glow.underMainStops)}` : ''
      }`}
    >
      <clipPath id={clipId}>
        <path d={`M${corners.join('L')}Z`} clipPath={`url(#${clipId}-wall)`} />
      </clipPath>
      <clipPath id={`${clipId}-wall`}>
        <rect x={left} y={-top} width={right - left} height={top - bottom} />
      </clipPath>
      <g clipPath={`url(#${clipId})`}>
        {cells.map(({ colour, path }) => (
          <path key={colour} d={path} fill={colour} />
        ))}
      </g>
      {contours.map(({ stops, pieces }) => (
        <path
          key={stops}
          d={pieces
            .map(([x1, y1, x2, y2]) => `M${x1.toFixed(3)} ${(-y1).toFixed(3)}L${x2.toFixed(3)} ${(-y2).toFixed(3)}`)
            .join('')}
          stroke={stops < 3 ? '#1f1c1a' : '#f3eee6'}
          strokeOpacity={0.7}
          strokeWidth={thin}
          fill="none"
        />
      ))}
      <path d={`M${corners.join('L')}Z`} fill="none" stroke="#1f1c1a" strokeWidth={thin * 2} />
      {sitters.map((place) => (
        <path
          key={place.id}
          clipPath={`url(#${clipId})`}
          d={`M${outline(place.at[0], place.eyeHeightM, place.at[1]).map(onWall).join('L')}Z`}
          fill="#d8d7d4"
          fillOpacity={0.5}
          stroke="#1f1c1a"
          strokeWidth={thin * 1.5}
          strokeDasharray={`${thin * 6} ${thin * 4}`}
        />
      ))}
      {contours.map(({ stops, pieces }) => {
        const middle = pieces[Math.floor(pieces.length / 2)]
        return (
          middle && (
            <text
              key={stops}
              x={middle[0]}
              y={-middle[1]}
              fontSize={thin * 11}
              textAnchor="middle"
              dominantBaseline="middle"
              fill={stops < 3 ? '#1f1c1a' : '#f3eee6'}
              stroke={stops < 3 ? '#e4e1da' : '#353230'}
              strokeWidth={thin * 4}
              paintOrder="stroke"
            >
              {stopsLabel(-stops)}
            </text>
          )
        )
      })}
      {peak && glow && (
        <g>
          <path
            d={`M${peak[0] - thin * 8} ${-peak[1]}h${thin * 16}M${peak[0]} ${-peak[1] - thin * 8}v${thin * 16}`}
            stroke="#8f4a0c"
            strokeWidth={thin * 2}
          />
          <text
            x={peak[0] + thin * 10}
            y={-peak[1] - thin * 6}
            fontSize={thin * 12}
            fontWeight={600}
            fill="#8f4a0c"
            stroke="#fbfaf8"
            strokeWidth={thin * 4}
            paintOrder="stroke"
          >
            {fNumberLabel(glow.fNumber)}
          </text>
        </g>
      )}
    </svg>
  )
}

/** Head and shoulders of a sitter from the front. */
function outline(x: number, eyeM: number, z: number): Point[] {
  const middle = eyeM + (CROWN_M - CHIN_M) / 2
  const half = (CROWN_M + CHIN_M) / 2
  const head = Array.from({ length: 21 }, (_, index): Point => {
    const turn = -0.85 * Math.PI * (1 - index / 10) - Math.PI / 2 + Math.PI
    return [x + Math.sin(-(1 - index / 10) * 0.85 * Math.PI) * HEAD_HALF_M, middle + Math.sin(turn) * half, z]
  })
  const shoulders = eyeM - SHOULDERS_BELOW_EYES_M
  const right: Point[] = [
    [x + 0.07, shoulders + 0.03, z],
    [x + SHOULDER_HALF_M * 0.85, shoulders - 0.02, z],
    [x + SHOULDER_HALF_M, shoulders - 0.1, z],
    [x + SHOULDER_HALF_M, 0, z],
  ]
  const left = right.map(([rx, y, rz]): Point => [2 * x - rx, y, rz]).reverse()
  return [...head, ...right, ...left]
}

/** What the greys mean, brightest first. */
export function WallLegend() {
  return (
    <ul aria-label="Stops against the main" className="flex flex-col gap-px text-sm">
      {STEPS.map((step) => (
        <li key={step.words} className="flex items-center gap-2">
          <span aria-hidden className="h-5 w-8 border border-edge" style={{ background: step.colour }} />
          {step.words}
        </li>
      ))}
    </ul>
  )
}
