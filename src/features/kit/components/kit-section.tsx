import { MoreHorizontal } from 'lucide-react'
import type { KitItem } from '#shared/api/kit.ts'
import type { KitKind } from '#shared/domain/kit/schema.ts'
import { cn } from '#src/lib/cn.ts'
import { Button, IconButton } from '#src/ui/button.tsx'
import { Menu } from '#src/ui/menu.tsx'
import { useIsPhone } from '#src/ui/use-media.ts'
import { KIND_WORDS, PROVENANCE_WORDS, type Reading, readingsOf } from '../kit-words.ts'

export type KitSectionProps = {
  kind: KitKind
  items: readonly KitItem[]
  mayChange: boolean
  onAdd: () => void
  onEdit: (item: KitItem) => void
  onCopy: (item: KitItem) => void
  onRemove: (item: KitItem) => void
}

export function KitSection(props: KitSectionProps) {
  const { kind, items, mayChange, onAdd } = props
  const words = KIND_WORDS[kind]
  const isPhone = useIsPhone()
  return (
    <section aria-label={words.many}>
      <div className="mb-2 flex items-end justify-between gap-3">
        <h2 className="text-xl">{words.many}</h2>
        {mayChange && (
          <Button size="small" onClick={onAdd}>
            Add a {words.one.toLowerCase()}
          </Button>
        )}
      </div>
      {items.length === 0 ? (
        <p className="rounded-r border border-dashed border-edge px-4 py-5 text-sm text-ink-soft">
          None yet. {words.empty}
        </p>
      ) : isPhone ? (
        <KitList {...props} />
      ) : (
        <KitGrid {...props} />
      )}
    </section>
  )
}

function KitGrid({ items, ...rest }: KitSectionProps) {
  const first = items[0]
  if (!first) return null
  return (
    <div className="overflow-x-auto rounded-r border border-hair bg-paper">
      <table className="w-full min-w-3xl border-collapse text-sm">
        <thead>
          <tr className="label-small text-left">
            <th className="px-3.5 py-2.5 font-semibold">Name</th>
            <th className="px-3.5 py-2.5 text-right font-semibold">Have</th>
            {readingsOf(first.body).map(({ label }) => (
              <th key={label} className="px-3.5 py-2.5 font-semibold">
                {label}
              </th>
            ))}
            <th className="w-12">
              <span className="sr-only">Actions</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {items.map((item) => (
            <tr key={item.id} className="border-t border-hair-soft align-top">
              <td className="max-w-64 px-3.5 py-2.5">
                <Name item={item} {...rest} />
                {item.note && <div className="text-xs text-ink-soft">{item.note}</div>}
              </td>
              <td className="px-3.5 py-2.5 text-right">{item.quantity}</td>
              {readingsOf(item.body).map((reading) => (
                <td key={reading.label} className="px-3.5 py-2.5 whitespace-nowrap">
                  {reading.value}
                  <From reading={reading} />
                </td>
              ))}
              <td className="py-1 pr-1 text-right">
                <ItemMenu item={item} {...rest} />
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  )
}

function KitList({ items, ...rest }: KitSectionProps) {
  return (
    <ul className="divide-y divide-hair-soft rounded-r border border-hair bg-paper">
      {items.map((item) => (
        <li key={item.id} className="px-3.5 py-2.5">
          <div className="flex items-start justify-between gap-2">
            <div className="min-w-0">
              <Name item={item} {...rest} />
              <span className="text-sm text-ink-soft"> × {item.quantity}</span>
            </div>
            <ItemMenu item={item} {...rest} />
          </div>
          <dl className="grid grid-cols-2 gap-x-4 gap-y-1.5 text-sm">
            {readingsOf(item.body).map((reading) => (
              <div key={reading.label}>
                <dt className="text-[0.8125rem] text-ink-soft">{reading.label}</dt>
                <dd>
                  {reading.value}
                  <From reading={reading} />
                </dd>
              </div>
            ))}
          </dl>
        </li>
      ))}
    </ul>
  )
}

type RowProps = Omit<KitSectionProps, 'items' | 'kind' | 'onAdd'> & { item: KitItem }

function Name({ item, mayChange, onEdit }: Pick<RowProps, 'item' | 'mayChange' | 'onEdit'>) {
  if (!mayChange) return <b className="font-semibold">{item.name}</b>
  return (
    <button
      type="button"
      onClick={() => onEdit(item)}
      className="rounded-r text-left font-semibold max-md:min-h-11 underline decoration-hair underline-offset-3 hover:decoration-ink"
    >
      {item.name}
    </button>
  )
}

/** Where a number comes from, below it; a guess stands out. */
function From({ reading }: { reading: Reading }) {
  if (!reading.stated) return null
  const { from, source } = reading.stated
  return (
    <span
      title={source || undefined}
      className={cn('block text-xs', from === 'assumed' ? 'text-glow-ink' : 'text-ink-soft')}
    >
      {PROVENANCE_WORDS[from]}
    </span>
  )
}

function ItemMenu({ item, mayChange, onEdit, onCopy, onRemove }: RowProps) {
  if (!mayChange) return null
  return (
    <Menu
      trigger={
        <IconButton label={`More for ${item.name}`}>
          <MoreHorizontal size={17} aria-hidden />
        </IconButton>
      }
      items={[
        { label: 'Change', onSelect: () => onEdit(item) },
        { label: 'Duplicate', onSelect: () => onCopy(item) },
        'line',
        { label: 'Remove', danger: true, onSelect: () => onRemove(item) },
      ]}
    />
  )
}
