import type { ReactNode } from 'react'
import type { PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { cn } from '#src/lib/cn.ts'
import { FramePicture } from '../frame-picture.tsx'

type ShotFaceProps = { planned: PlannedShot; className?: string; children?: ReactNode }

/** A shot's picture with its number. */
export function ShotFace({ planned: { number, cover }, className, children }: ShotFaceProps) {
  return (
    <div className={cn('relative h-[122px] overflow-hidden rounded-sm border border-night-3 bg-night-2', className)}>
      {cover && <FramePicture frame={cover} widthPx={112} className="size-full [&_img]:object-[50%_25%]" />}
      <span className="absolute bottom-px left-1.5 font-display text-2xl font-semibold text-white [text-shadow:0_1px_4px_#000]">
        {number ?? '–'}
      </span>
      {children}
    </div>
  )
}

/** What the hand carries while a shot is moved. */
export function CarriedShot({ planned }: { planned: PlannedShot }) {
  return (
    <div className="w-28 cursor-grabbing text-bone">
      <ShotFace planned={planned} className="shadow-float outline-2 outline-glow-lit" />
      <div className="mt-[5px] line-clamp-2 rounded-sm bg-night px-1 text-xs leading-[1.25]">{planned.shot.title}</div>
    </div>
  )
}
