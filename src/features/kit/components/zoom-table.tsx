import { X } from 'lucide-react'
import type { UnitNumbers } from '#shared/domain/kit/schema.ts'
import { cn } from '#src/lib/cn.ts'
import { Button, IconButton } from '#src/ui/button.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'

export type ZoomTableProps = {
  zoom: UnitNumbers['zoom']
  onChange: (zoom: UnitNumbers['zoom']) => void
  className?: string
}

/** Guide numbers by zoom setting, as the maker prints them. */
export function ZoomTable({ zoom, onChange, className }: ZoomTableProps) {
  const last = zoom[zoom.length - 1]
  return (
    <fieldset className={cn('min-w-0', className)}>
      <legend className="label-small mb-1">Guide number by zoom, as the maker prints it</legend>
      <ul className="flex flex-col gap-1.5">
        {zoom.map((step, index) => (
          <li key={index} className="flex items-start gap-2">
            <NumberInput
              aria-label={`Zoom setting ${index + 1}`}
              className="w-28"
              unit="mm"
              min={10}
              max={400}
              value={step.focalMm}
              onChange={(focalMm) => onChange(zoom.with(index, { ...step, focalMm }))}
            />
            <NumberInput
              aria-label={`Guide number at ${step.focalMm} mm`}
              className="w-28"
              unit="m"
              min={0.1}
              max={500}
              value={step.guideNumberM}
              onChange={(guideNumberM) => onChange(zoom.with(index, { ...step, guideNumberM }))}
            />
            <IconButton label={`Remove ${step.focalMm} mm`} onClick={() => onChange(zoom.toSpliced(index, 1))}>
              <X size={15} aria-hidden />
            </IconButton>
          </li>
        ))}
      </ul>
      <Button
        size="small"
        className="mt-1.5"
        disabled={zoom.length >= 20}
        onClick={() =>
          onChange([
            ...zoom,
            { focalMm: Math.min(400, (last?.focalMm ?? 17.5) * 2), guideNumberM: last?.guideNumberM ?? 30 },
          ])
        }
      >
        Add a zoom setting
      </Button>
    </fieldset>
  )
}
