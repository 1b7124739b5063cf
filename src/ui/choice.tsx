import { cn } from '#src/lib/cn.ts'

type ChoiceProps<Value extends string> = {
  label: string
  options: readonly { value: Value; label: string }[]
  value: Value
  onChange: (value: Value) => void
  className?: string
}

/** One of a few, all in sight. */
export function Choice<Value extends string>({ label, options, value, onChange, className }: ChoiceProps<Value>) {
  return (
    <div role="group" aria-label={label} className={cn('inline-flex rounded-r border border-edge bg-paper', className)}>
      {options.map((option) => (
        <button
          key={option.value}
          type="button"
          aria-pressed={option.value === value}
          onClick={() => onChange(option.value)}
          className="rounded-sm px-3 py-1.5 text-sm font-semibold whitespace-nowrap text-ink-soft hover:text-ink aria-pressed:bg-ink aria-pressed:text-paper max-md:min-h-11"
        >
          {option.label}
        </button>
      ))}
    </div>
  )
}
