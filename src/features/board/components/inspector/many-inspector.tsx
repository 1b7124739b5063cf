import {
  AlignCenterHorizontal,
  AlignCenterVertical,
  AlignEndHorizontal,
  AlignEndVertical,
  AlignHorizontalSpaceBetween,
  AlignStartHorizontal,
  AlignStartVertical,
  AlignVerticalSpaceBetween,
  type LucideIcon,
} from 'lucide-react'
import { type Alignment, type Axis, align, distribute } from '#shared/domain/board/align.ts'
import type { Box } from '#shared/domain/board/schema.ts'
import { IconButton } from '#src/ui/button.tsx'
import { announce, asStep, selectedItems, useWall } from '../../wall-control.ts'
import { writeBoxes } from '../../write-board.ts'

const EDGES: readonly [Alignment, string, LucideIcon][] = [
  ['left', 'Line up left edges', AlignStartVertical],
  ['centre', 'Line up middles, one below the other', AlignCenterVertical],
  ['right', 'Line up right edges', AlignEndVertical],
  ['top', 'Line up top edges', AlignStartHorizontal],
  ['middle', 'Line up middles, side by side', AlignCenterHorizontal],
  ['bottom', 'Line up bottom edges', AlignEndHorizontal],
]
const GAPS: readonly [Axis, string, LucideIcon][] = [
  ['across', 'Equal gaps across', AlignHorizontalSpaceBetween],
  ['down', 'Equal gaps down', AlignVerticalSpaceBetween],
]

/** Several things at once: line them up, space them out. */
export function ManyInspector({ count }: { count: number }) {
  const control = useWall()
  const write = (words: string, boxes: ReadonlyMap<string, Box>) => {
    asStep(control, () => writeBoxes(control.doc, boxes))
    announce(control, words)
  }
  return (
    <>
      <div role="group" aria-label="Line up" className="-mx-1.5 flex flex-wrap gap-0.5">
        {EDGES.map(([edge, label, Icon]) => (
          <IconButton key={edge} label={label} onClick={() => write(label, align(selectedItems(control), edge))}>
            <Icon size={16} aria-hidden />
          </IconButton>
        ))}
      </div>
      {count > 2 && (
        <div role="group" aria-label="Space out" className="-mx-1.5 flex gap-0.5">
          {GAPS.map(([axis, label, Icon]) => (
            <IconButton key={axis} label={label} onClick={() => write(label, distribute(selectedItems(control), axis))}>
              <Icon size={16} aria-hidden />
            </IconButton>
          ))}
        </div>
      )}
    </>
  )
}
