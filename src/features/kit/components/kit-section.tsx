import { ChevronDown, MoreHorizontal } from 'lucide-react'
import { Fragment, useState } from 'react'
import type { KitItem } from '#shared/api/kit.ts'
import { faultsOf } from '#shared/domain/kit/faults.ts'
import type { KitKind } from '#shared/domain/kit/schema.ts'
import { cn } from '#src/lib/cn.ts'
import { Button, IconButton } from '#src/ui/button.tsx'
import { Menu } from '#src/ui/menu.tsx'
import { useIsPhone } from '#src/ui/use-media.ts'
import { KIND_WORDS, type NameOf, PROVENANCE_WORDS, type Reading, detailsOf, readingsOf } from '../kit-words.ts'

export type KitSectionProps = {
  kind: KitKind
  items: readonly KitItem[]
  nameOf: NameOf
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

function toggled(open: ReadonlySet<string>, id: string): ReadonlySet<string> {
  const next = new Set(open)
  if (!next.delete(id)) next.add(id)
  return next
}

function KitGrid({ items, ...rest }: KitSectionProps) {
  const first = items[0]
  const [open, setOpen] = useState<ReadonlySet<string>>(new Set())
  if (!first) return null
  const columns = readingsOf(first.body).length + 3
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
            <Fragment key={item.id}>
              <tr className="border-t border-hair-soft align-top">
                <td className="max-w-64 px-3.5 py-2.5">
                  <Name item={item} {...rest} />
                  {item.note && <div className="text-xs text-ink-soft">{item.note}</div>}
                  <Fault item={item} />
                  <button
                    type="button"
                    aria-expanded={open.has(item.id)}
                    onClick={() => setOpen(toggled(open, item.id))}
                    className="mt-0.5 flex items-center gap-1 rounded-r text-xs text-ink-soft hover:text-ink"
                  >
                    <ChevronDown
                      size={13}
                      aria-hidden
                      className={cn('transition-transform', open.has(item.id) && 'rotate-180')}
                    />
                    {MORE[item.body.kind]} <span className="sr-only">of {item.name}</span>
                  </button>
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
              {open.has(item.id) && (
                <tr>
                  <td colSpan={columns} className="px-3.5 pb-3">
                    <Details item={item} nameOf={rest.nameOf} />
                  </td>
                </tr>
              )}
            </Fragment>
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
          <Fault item={item} />
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
          <details className="mt-1">
            <summary className="flex min-h-11 cursor-pointer items-center gap-1 text-sm text-ink-soft">
              <ChevronDown size={15} aria-hidden />
              {MORE[item.body.kind]} <span className="sr-only">of {item.name}</span>
            </summary>
            <Details item={item} nameOf={rest.nameOf} />
          </details>
        </li>
      ))}
    </ul>
  )
}

/** What stands one press away, by kind. */
const MORE: Readonly<Record<KitKind, string>> = {
  unit: 'Zoom, sync, triggers, sources',
  lamp: 'Sources',
  modifier: 'Sources',
  gel: 'Sources',
  support: 'Sources',
  panel: 'Sources',
}

function Details({ item, nameOf }: { item: KitItem; nameOf: NameOf }) {
  return (
    <dl className="grid max-w-3xl grid-cols-[minmax(7rem,auto)_minmax(0,1fr)] gap-x-4 gap-y-1 rounded-r bg-ground px-3 py-2 text-xs max-md:text-[0.8125rem]">
      {detailsOf(item.body, nameOf).map(({ label, words }, index) => (
        <Fragment key={index}>
          <dt className="text-ink-soft">{label}</dt>
          <dd className="min-w-0 break-words">{words}</dd>
        </Fragment>
      ))}
    </dl>
  )
}

/** Why no setup can use an item that is older than today's rules. */
function Fault({ item }: { item: KitItem }) {
  const [fault] = faultsOf(item.body)
  if (!fault) return null
  return (
    <p className="text-xs font-semibold text-velvet max-md:text-[0.8125rem]">Kept out of setups. {fault.message}</p>
  )
}

type RowProps = Omit<KitSectionProps, 'items' | 'kind' | 'onAdd' | 'nameOf'> & { item: KitItem }

function Name({ item, mayChange, onEdit }: Pick<RowProps, 'item' | 'mayChange' | 'onEdit'>) {
  if (!mayChange) return <b className="font-semibold">{item.name}</b>
  return (
    <button
      type="button"
      onClick={() => onEdit(item)}
      className="rounded-r text-left font-semibold max-md:min-h-11 max-md:min-w-11 underline decoration-hair underline-offset-3 hover:decoration-ink"
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
      className={cn('block text-xs max-md:text-[0.8125rem]', from === 'assumed' ? 'text-glow-ink' : 'text-ink-soft')}
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
