import { Button } from '#src/ui/button.tsx'
import { Field } from '#src/ui/field.tsx'
import { Select } from '#src/ui/select.tsx'
import type { Kit } from '../../use-kit.ts'

type Copied = { kitId: string; version: number; name: string }

type KitSelectProps<Item extends Copied> = {
  label: string
  items: readonly Item[]
  value: Item | null
  kit: Kit
  /** What stands for nothing chosen; absent: something has to be. */
  none?: string
  /** What an item is called in the list; its name by itself. */
  wordsFor?: (item: Item) => string
  onChange: (item: Item | null) => void
}

const NONE = ''

/** Picks from the studio's kit; what is picked is copied, and newer numbers of the kit room are offered. */
export function KitSelect<Item extends Copied>({
  label,
  items,
  value,
  kit,
  none,
  wordsFor = (item) => item.name,
  onChange,
}: KitSelectProps<Item>) {
  const gone = value !== null && !items.some((item) => item.kitId === value.kitId)
  const newest = value && items.find((item) => item.kitId === value.kitId && item.version > value.version)
  const options = [
    ...(none === undefined ? [] : [{ value: NONE, label: none }]),
    ...(gone ? [{ value: value.kitId, label: wordsFor(value) }] : []),
    ...items.map((item) => ({ value: item.kitId, label: wordsFor(item) })),
  ]
  return (
    <Field
      label={label}
      hint={gone && kit.state === 'there' ? 'No longer in the kit room; this light keeps its numbers.' : undefined}
    >
      <Select
        options={options}
        value={value?.kitId ?? NONE}
        onChange={(kitId) =>
          onChange(items.find((item) => item.kitId === kitId) ?? (kitId === value?.kitId ? value : null))
        }
      />
      {newest && (
        <p className="mt-1 flex flex-wrap items-center gap-2 text-xs text-glow-ink">
          The kit room has newer numbers.
          <Button size="small" onClick={() => onChange(newest)}>
            Take over the new numbers
          </Button>
        </p>
      )}
    </Field>
  )
}
