import { cn } from '#src/lib/cn.ts'

type LightSwitchProps = { name: string; isOn: boolean; onChange: (isOn: boolean) => void }

/** Turns one light on or off. */
export function LightSwitch({ name, isOn, onChange }: LightSwitchProps) {
  return (
    <button
      type="button"
      role="switch"
      aria-checked={isOn}
      aria-label={`${name} on/off`}
      title={isOn ? `Turn the ${name.toLowerCase()} off` : `Turn the ${name.toLowerCase()} on`}
      onClick={() => onChange(!isOn)}
      className="grid h-8 w-9 place-items-center rounded-r max-md:size-11"
    >
      <span
        aria-hidden
        className={cn(
          'flex h-4 w-7 items-center rounded-full border px-0.5',
          isOn ? 'justify-end border-glow bg-glow-wash' : 'border-edge bg-white',
        )}
      >
        <span className={cn('size-2.5 rounded-full', isOn ? 'bg-glow' : 'border border-edge')} />
      </span>
    </button>
  )
}
