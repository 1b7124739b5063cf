import type { ComponentProps } from 'react'
import { cn } from '#src/lib/cn.ts'

export type ButtonVariant = 'primary' | 'plain' | 'quiet' | 'danger' | 'glow' | 'night'

const LOOKS: Record<ButtonVariant, string> = {
  primary: 'border-velvet bg-velvet text-white hover:bg-velvet-deep hover:border-velvet-deep',
  plain: 'border-edge bg-paper text-ink hover:bg-white hover:border-ink-soft',
  quiet: 'border-transparent bg-transparent text-ink-soft hover:text-ink hover:bg-ink/5',
  danger: 'border-velvet bg-paper text-velvet hover:bg-velvet-wash',
  glow: 'border-glow-lit bg-glow-lit text-[#1f1508] hover:bg-[#f7b566]',
  night: 'border-night-edge bg-transparent text-bone hover:bg-night-3',
}

const SIZES = {
  small: 'px-2.5 py-1 text-xs max-md:min-h-11 max-md:px-3.5 max-md:text-sm',
  normal: 'px-3.5 py-2 text-sm max-md:min-h-11',
  large: 'px-5 py-3 text-[0.9375rem] min-h-12',
}

export type ButtonProps = ComponentProps<'button'> & {
  variant?: ButtonVariant
  size?: keyof typeof SIZES
  /** Work is under way: pressing again does nothing, and the button says so. */
  busy?: boolean
}

/** How a button looks, for links that act as one. */
export function buttonClass(variant: ButtonVariant = 'plain', size: keyof typeof SIZES = 'normal'): string {
  return cn(
    'inline-flex items-center justify-center gap-2 rounded-r border font-semibold leading-tight whitespace-nowrap no-underline transition-colors',
    'disabled:opacity-50 aria-disabled:opacity-60',
    LOOKS[variant],
    SIZES[size],
  )
}

export function Button({
  variant = 'plain',
  size = 'normal',
  busy = false,
  className,
  onClick,
  type = 'button',
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      aria-busy={busy || undefined}
      aria-disabled={busy || rest['aria-disabled']}
      onClick={(event) => {
        if (busy) event.preventDefault()
        else onClick?.(event)
      }}
      className={cn(buttonClass(variant, size), className)}
    />
  )
}

export type IconButtonProps = Omit<ButtonProps, 'aria-label'> & { label: string }

/** A square button with a sign instead of a word; `label` is its name and its tooltip. */
export function IconButton({ label, variant = 'quiet', className, ...rest }: IconButtonProps) {
  return (
    <Button
      {...rest}
      variant={variant}
      aria-label={label}
      title={label}
      className={cn('size-9 !p-0 max-md:size-11', className)}
    />
  )
}
