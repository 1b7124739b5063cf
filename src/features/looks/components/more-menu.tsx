import { MoreHorizontal } from 'lucide-react'
import { IconButton } from '#src/ui/button.tsx'
import { Menu, type MenuItem } from '#src/ui/menu.tsx'

export type MoreMenuProps = { label: string; items: readonly MenuItem[] }

/** What can be done with one thing, behind three dots. */
export function MoreMenu({ label, items }: MoreMenuProps) {
  return (
    <Menu
      trigger={
        <IconButton label={label}>
          <MoreHorizontal size={18} aria-hidden />
        </IconButton>
      }
      items={items}
    />
  )
}
