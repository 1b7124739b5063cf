import type { Guide } from '../../snapping.ts'
import type { Project } from '../../plan-view.ts'

/** Thin lines to what a part in a hand has snapped to. */
export function Guides({ guides, project }: { guides: readonly Guide[]; project: Project }) {
  return (
    <g aria-hidden className="pointer-events-none" stroke="var(--color-velvet)" fill="none">
      {guides.map(({ from, to }, index) => {
        const [x1, y1] = project(from)
        const [x2, y2] = project(to)
        return (
          <g key={index}>
            <path d={`M${x1} ${y1}L${x2} ${y2}`} strokeWidth={1} />
            {x1 === x2 && y1 === y2 && <circle cx={x1} cy={y1} r={15} strokeWidth={1} />}
          </g>
        )
      })}
    </g>
  )
}
