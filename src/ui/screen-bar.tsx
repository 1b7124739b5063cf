import { MoreHorizontal } from 'lucide-react'
import { type ReactNode, createContext, use } from 'react'
import { cn } from '#src/lib/cn.ts'
import { Button, type ButtonVariant, IconButton } from './button.tsx'
import { Menu } from './menu.tsx'
import { useIsPhone } from './use-media.ts'

export type ScreenAction = {
  label: string
  onPress: () => void
  variant?: ButtonVariant
  disabled?: boolean
  busy?: boolean
  icon?: ReactNode
}

/** What the frame around a screen puts at the end of its bar on phones: the save sign. */
export const ScreenBarAside = createContext<ReactNode>(null)

export type ScreenBarProps = {
  title: ReactNode
  sub?: ReactNode
  /** In rising order; the primary one last. On phones the primary one stays and the others fold into a menu. */
  actions?: readonly ScreenAction[]
  /** Controls of its own, before the actions (a search field, tabs). */
  children?: ReactNode
  /** On phones the primary action hangs over the lower right corner instead of standing under the title. */
  float?: boolean
  className?: string
}

/** The head of a screen: its title at the left, what can be done at the right. */
export function ScreenBar({ title, sub, actions = [], children, float = false, className }: ScreenBarProps) {
  const isPhone = useIsPhone()
  const aside = use(ScreenBarAside)
  const primary = actions.find((action) => action.variant === 'primary')
  const others = actions.filter((action) => action !== primary)
  const button = (action: ScreenAction, extra?: string) => (
    <Button
      key={action.label}
      variant={action.variant ?? 'plain'}
      disabled={action.disabled}
      busy={action.busy ?? false}
      onClick={action.onPress}
      className={extra}
    >
      {action.icon}
      {action.label}
    </Button>
  )
  if (!isPhone) {
    return (
      <header className={cn('no-print flex flex-wrap items-center gap-x-3.5 gap-y-2 px-6 pt-4 pb-3', className)}>
        <h1 className="text-2xl">{title}</h1>
        {sub !== undefined && <div className="text-xs text-ink-soft">{sub}</div>}
        <span className="flex-1" />
        {children}
        {actions.map((action) => button(action))}
      </header>
    )
  }
  const more = others.length > 0 && (
    <Menu
      trigger={
        <IconButton label="More actions" variant="plain">
          <MoreHorizontal size={18} aria-hidden />
        </IconButton>
      }
      items={others.map((action) => ({
        label: action.label,
        onSelect: action.onPress,
        disabled: action.disabled ?? false,
        danger: action.variant === 'danger',
      }))}
    />
  )
  return (
    <header className={cn('no-print border-b border-hair bg-paper px-[18px] pt-3 pb-2.5', className)}>
      <div className="flex min-h-9 items-center gap-2.5">
        <h1 className="min-w-0 flex-1 text-[1.4375rem] leading-tight">{title}</h1>
        {aside}
        {(float || !primary) && more}
      </div>
      {sub !== undefined && <div className="text-[0.8125rem] text-ink-soft">{sub}</div>}
      {children !== undefined && <div className="mt-2 flex flex-wrap items-center gap-2">{children}</div>}
      {primary &&
        (float ? (
          button(
            primary,
            'fixed right-4 bottom-[5.25rem] z-30 !h-[52px] !rounded-full !px-5 !text-[0.9375rem] shadow-float',
          )
        ) : (
          <div className="mt-2.5 flex gap-2">
            {button(primary, 'flex-1')}
            {more}
          </div>
        ))}
    </header>
  )
}
