import type { ReactNode } from 'react'
import type { Stated } from '#shared/domain/kit/schema.ts'
import { Popover } from '#src/ui/popover.tsx'

type HowProps = {
  /** Name of the number, for its accessible name. */
  label: string
  value: ReactNode
  children: ReactNode
}

/** A number that opens to how it is worked out. */
export function How({ label, value, children }: HowProps) {
  return (
    <Popover
      label={`How ${label} is worked out`}
      align="end"
      trigger={
        <button
          type="button"
          aria-label={`${label}: how it is worked out`}
          className="group rounded-r text-right whitespace-nowrap max-md:min-h-11 max-md:min-w-9"
        >
          <span className="border-b border-dotted border-edge group-hover:border-ink">{value}</span>
        </button>
      }
    >
      {children}
    </Popover>
  )
}

export type InputRow = [name: string, value: ReactNode, from?: string | undefined]

/** Formula at the top, then what went in, then where it comes from. */
export function Workings({
  formula,
  inputs,
  note,
}: {
  formula: string
  inputs: readonly InputRow[]
  note?: ReactNode
}) {
  return (
    <div className="text-sm">
      <p className="font-semibold">{formula}</p>
      <dl className="mt-2 grid grid-cols-[1fr_auto] gap-x-4 gap-y-1">
        {inputs.map(([name, value, from]) => (
          <div key={name} className="contents">
            <dt className="text-ink-soft">
              {name}
              {from !== undefined && <span className="block text-xs text-ink-faint">{from}</span>}
            </dt>
            <dd className="text-right">{value}</dd>
          </div>
        ))}
      </dl>
      {note !== undefined && <p className="mt-2 border-t border-hair-soft pt-2 text-xs text-ink-soft">{note}</p>}
    </div>
  )
}

/** "assumed: common practice, no source". */
export function stated(number: Stated): string {
  return number.source === '' ? number.from : `${number.from}: ${number.source}`
}
