import { DropdownMenu } from 'radix-ui'
import type { ReactNode } from 'react'
import { cn } from '#src/lib/cn.ts'

export type MenuItem =
  | {
      label: string
      onSelect: () => void
      hint?: string
      icon?: ReactNode
      danger?: boolean
      disabled?: boolean
      checked?: boolean
    }
  | 'line'

export type MenuProps = {
  /** The one element that opens it, a button with a name. */
  trigger: ReactNode
  items: readonly MenuItem[]
  align?: 'start' | 'center' | 'end'
}

export function Menu({ trigger, items, align = 'end' }: MenuProps) {
  return (
    <DropdownMenu.Root>
      <DropdownMenu.Trigger asChild>{trigger}</DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          align={align}
          sideOffset={4}
          collisionPadding={8}
          className="fade-in z-50 max-h-(--radix-dropdown-menu-content-available-height) min-w-44 overflow-y-auto rounded-r border border-hair bg-paper py-1 text-ink shadow-over"
        >
          {items.map((item, index) =>
            item === 'line' ? (
              <DropdownMenu.Separator key={index} className="my-1 h-px bg-hair" />
            ) : (
              <DropdownMenu.Item
                key={index}
                disabled={item.disabled ?? false}
                onSelect={item.onSelect}
                className={cn(
                  'flex cursor-pointer items-center gap-2.5 px-3.5 py-1.5 text-sm outline-none max-md:min-h-11 max-md:text-base',
                  'data-[highlighted]:bg-ink/8 data-[disabled]:cursor-not-allowed data-[disabled]:text-ink-faint',
                  item.danger && 'text-velvet',
                )}
              >
                {item.checked !== undefined && <span className="w-3 flex-none">{item.checked ? '✓' : ''}</span>}
                {item.icon}
                <span className="flex-1">{item.label}</span>
                {item.hint !== undefined && <span className="text-xs text-ink-soft">{item.hint}</span>}
                {item.checked && <span className="sr-only">chosen</span>}
              </DropdownMenu.Item>
            ),
          )}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  )
}
