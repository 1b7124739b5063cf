import type { SitterPlace } from '#shared/domain/lighting/schema.ts'

type SitterShapeProps = { place: SitterPlace; pxPerM: number }
type FromAboveProps = SitterShapeProps & { leastHeadPx?: number }

const LINE = { fill: '#fff', stroke: 'var(--color-ink)', strokeWidth: 1.6, strokeLinejoin: 'round' as const }
/** Measures of a grown-up for the drawings, metres (assumed). */
const HEAD_M = 0.11
const SHOULDER_HALF_M = 0.23

/** A sitter from above, the head at 0,0: body and head each turned, thighs and a seat when seated. */
export function SitterFromAbove({ place, pxPerM, leastHeadPx = 8 }: FromAboveProps) {
  const head = Math.max(leastHeadPx, HEAD_M * pxPerM)
  const px = head / HEAD_M
  return (
    <g>
      <g transform={`rotate(${-place.turnDeg})`}>
        {place.pose === 'seated' && (
          <>
            <rect
              x={-0.22 * px}
              y={-0.2 * px}
              width={0.44 * px}
              height={0.42 * px}
              rx={3}
              {...LINE}
              strokeWidth={1}
              strokeDasharray="3 2.5"
            />
            {[-1, 1].map((side) => (
              <rect
                key={side}
                x={(side * 0.1 - 0.075) * px}
                y={0}
                width={0.15 * px}
                height={0.5 * px}
                rx={0.07 * px}
                {...LINE}
                strokeWidth={1.2}
              />
            ))}
          </>
        )}
        <ellipse rx={SHOULDER_HALF_M * px} ry={0.12 * px} {...LINE} strokeWidth={1.2} />
      </g>
      <g transform={`rotate(${-(place.turnDeg + place.headTurnDeg)})`}>
        <circle r={head} {...LINE} />
        <path d={`M0 ${head}v${Math.max(5, head * 0.55)}`} {...LINE} />
      </g>
    </g>
  )
}

/** A sitter from the side, the eyes at 0,0: wall at the left, so that facing the camera is facing right. */
export function SitterFromSide({ place, pxPerM }: SitterShapeProps) {
  const floor = place.eyeHeightM * pxPerM
  const head = Math.max(6, HEAD_M * pxPerM)
  const turn = (place.turnDeg * Math.PI) / 180
  const headTurn = ((place.turnDeg + place.headTurnDeg) * Math.PI) / 180
  const nod = (place.headNodDeg * Math.PI) / 180
  const noseX = Math.cos(headTurn) * Math.cos(nod)
  const noseY = Math.sin(nod)
  const neck = head + 2
  return (
    <g fill="none" stroke="var(--color-ink)" strokeWidth={1.6} strokeLinejoin="round">
      {place.pose === 'seated' ? (
        <Seated floor={floor} neck={neck} facing={Math.cos(turn)} pxPerM={pxPerM} />
      ) : (
        <path
          fill="#fff"
          d={`M${-0.16 * pxPerM} ${floor}Q${-0.15 * pxPerM} ${neck} 0 ${neck}Q${0.17 * pxPerM} ${neck} ${0.19 * pxPerM} ${floor}`}
        />
      )}
      <circle r={head} fill="#fff" />
      {Math.abs(noseX) > 0.12 && (
        <path d={`M${noseX * head} ${noseY * head}l${noseX * head * 0.5} ${noseY * head * 0.5}`} />
      )}
    </g>
  )
}

type SeatedProps = { floor: number; neck: number; facing: number; pxPerM: number }

/** Back upright, thighs level, lower legs down, on a seat. */
function Seated({ floor, neck, facing, pxPerM }: SeatedProps) {
  const seat = Math.min(floor - 2, Math.max(neck + 4, floor - 0.45 * pxPerM))
  const knee = 0.45 * pxPerM * facing
  const half = 0.13 * pxPerM
  return (
    <>
      <path
        d={`M${-0.21 * pxPerM} ${seat + 5}H${0.21 * pxPerM}M${-0.17 * pxPerM} ${seat + 5}V${floor}M${0.17 * pxPerM} ${seat + 5}V${floor}`}
        stroke="var(--color-rail)"
      />
      <path fill="#fff" d={`M${-half} ${seat}Q${-half} ${neck} 0 ${neck}Q${half} ${neck} ${half} ${seat}Z`} />
      <path d={`M0 ${seat}L${knee} ${seat - 1}V${floor}h${6 * Math.sign(facing || 1)}`} strokeWidth={3.5} />
    </>
  )
}
