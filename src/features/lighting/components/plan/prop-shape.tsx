import type { Point, Prop } from '#shared/domain/lighting/schema.ts'
import { type Flat, outline } from '../../light-form.ts'
import type { DrawingKind } from '../../parts.ts'

type PropShapeProps = { prop: Prop; pxPerM: number; seen: DrawingKind }

/** What is thinner is drawn this thick, CSS px. */
const LEAST_PX = 5
/** A set's parts are as deep as they are wide, up to this, metres. */
const DEEPEST_M = 0.8

/** A panel, a flag or a part of the set with its middle at 0,0. */
export function PropShape(props: PropShapeProps) {
  if (props.prop.kind !== 'prop') return <Panel {...props} />
  return props.seen === 'plan' ? <FromAbove {...props} /> : <FromSide {...props} />
}

/** Panels turn about the upright axis: a thin box seen as it is. */
function Panel({ prop, pxPerM, seen }: PropShapeProps) {
  const turn = (prop.turnDeg * Math.PI) / 180
  const [sin, cos] = [Math.sin(turn), Math.cos(turn)]
  const thin = LEAST_PX / pxPerM / 2
  const corners = [-1, 1].flatMap((across) =>
    [-1, 1].flatMap((upward) =>
      [-thin, thin].map((back): Point => {
        const along = (across * prop.widthM) / 2
        return [along * cos + back * sin, (upward * prop.heightM) / 2, -along * sin + back * cos]
      }),
    ),
  )
  const flat = corners.map(([x, y, z]): Flat =>
    seen === 'plan' ? [x * pxPerM, z * pxPerM] : [z * pxPerM, -y * pxPerM],
  )
  const line = prop.kind === 'flag' ? 'var(--color-ink)' : 'var(--color-draft)'
  return (
    <path
      d={outline(flat)}
      fill={seen === 'plan' || prop.kind === 'flag' ? line : '#fff'}
      fillOpacity={seen === 'plan' || prop.kind === 'panel' ? 1 : 0.75}
      stroke={line}
      strokeWidth={1.2}
    />
  )
}

/** Its own colour, with a line that can be seen whatever that is. */
function colours(prop: Prop) {
  return { fill: prop.colour, fillOpacity: 0.28, stroke: 'var(--color-ink-soft)', strokeWidth: 1.4 }
}

function FromAbove({ prop, pxPerM }: PropShapeProps) {
  const half = Math.max(LEAST_PX, (prop.widthM * pxPerM) / 2)
  const deep = Math.min(half, (DEEPEST_M * pxPerM) / 2)
  const own = colours(prop)
  const rect = { x: -half, y: -deep, width: half * 2, height: deep * 2 }
  const marks = () => {
    switch (prop.shape) {
      case 'block':
        return <rect {...rect} {...own} />
      case 'table':
        return (
          <>
            <rect {...rect} rx={2} {...own} />
            <rect
              x={-half + 3}
              y={-deep + 3}
              width={Math.max(0, half * 2 - 6)}
              height={Math.max(0, deep * 2 - 6)}
              {...own}
              fill="none"
              strokeWidth={0.8}
            />
          </>
        )
      case 'chair':
        return (
          <>
            <rect x={-half} y={-half} width={half * 2} height={half * 2} rx={3} {...own} />
            <path d={`M${-half} ${-half + 2}H${half}`} {...own} strokeWidth={3.5} />
          </>
        )
      case 'books':
        return (
          <>
            <rect {...rect} {...own} />
            <rect {...rect} {...own} fill="none" transform="rotate(14) scale(.86)" />
          </>
        )
      case 'globe':
        return (
          <>
            <circle r={half} {...own} fill="none" strokeWidth={2} />
            <circle r={half * 0.76} {...own} />
          </>
        )
      case 'cup':
        return (
          <>
            <circle r={half} {...own} />
            <path d={`M${half} -3q6 3 0 6`} {...own} fill="none" />
          </>
        )
      case 'plant':
        return (
          <>
            {[0, 60, 120].map((deg) => (
              <ellipse key={deg} rx={half} ry={half * 0.36} transform={`rotate(${deg})`} {...own} />
            ))}
          </>
        )
      case 'ball':
      case 'post':
        return <circle r={half} {...own} />
    }
  }
  return <g transform={`rotate(${-prop.turnDeg})`}>{marks()}</g>
}

function FromSide({ prop, pxPerM }: PropShapeProps) {
  const up = Math.max(LEAST_PX, prop.heightM * pxPerM) / 2
  const half = Math.max(LEAST_PX, (Math.min(prop.widthM, DEEPEST_M) * pxPerM) / 2)
  const own = colours(prop)
  switch (prop.shape) {
    case 'block':
      return <rect x={-half} y={-up} width={half * 2} height={up * 2} {...own} />
    case 'ball':
      return <circle r={Math.min(half, up)} {...own} />
    case 'post':
      return (
        <>
          <rect x={-half * 0.6} y={-up} width={half * 1.2} height={up * 2} {...own} />
          <path d={`M${-half} ${-up}H${half}M${-half} ${up}H${half}`} {...own} strokeWidth={2.5} />
        </>
      )
    case 'table':
      return (
        <>
          <rect x={-half} y={-up} width={half * 2} height={4} {...own} />
          <path d={`M${-half + 3} ${-up + 4}V${up}M${half - 3} ${-up + 4}V${up}`} {...own} fill="none" />
        </>
      )
    case 'chair': {
      // The seat about half up; the back is behind whoever sits on it.
      const back = -half * Math.sign(Math.cos((prop.turnDeg * Math.PI) / 180) || 1)
      return (
        <>
          <path d={`M${back} ${-up}V${up}M${-back} 0V${up}M${-half} 0H${half}`} {...own} fill="none" strokeWidth={2} />
        </>
      )
    }
    case 'globe': {
      const radius = Math.min(half, up * 0.62)
      return (
        <>
          <path d={`M0 ${-up + radius * 2}V${up}M${-half * 0.6} ${up}H${half * 0.6}`} {...own} fill="none" />
          <circle cy={-up + radius} r={radius} {...own} fill="none" strokeWidth={2} />
          <circle cy={-up + radius} r={radius * 0.76} {...own} />
        </>
      )
    }
    case 'books':
      return (
        <>
          {[-1, -1 / 3, 1 / 3].map((from, index) => (
            <rect
              key={from}
              x={-half + index * 1.5}
              y={from * up}
              width={half * 2 - 3}
              height={(up * 2) / 3}
              {...own}
            />
          ))}
        </>
      )
    case 'cup':
      return (
        <>
          <path d={`M${-half} ${-up}H${half}L${half * 0.7} ${up}H${-half * 0.7}Z`} {...own} />
          <path d={`M${half * 0.9} ${-up * 0.5}q6 ${up * 0.4} 0 ${up * 0.8}`} {...own} fill="none" />
        </>
      )
    case 'plant':
      return (
        <>
          <path d={`M${-half * 0.45} ${up * 0.45}H${half * 0.45}L${half * 0.35} ${up}H${-half * 0.35}Z`} {...own} />
          <path
            d={`M0 ${up * 0.45}Q${-half} ${up * 0.2} ${-half} ${-up * 0.5}M0 ${up * 0.45}V${-up}M0 ${up * 0.45}Q${half} ${up * 0.2} ${half} ${-up * 0.5}`}
            {...own}
            fill="none"
            strokeWidth={2}
          />
        </>
      )
  }
}
