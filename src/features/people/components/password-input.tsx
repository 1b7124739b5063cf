import { Eye, EyeOff } from 'lucide-react'
import { useState } from 'react'
import { IconButton } from '#src/ui/button.tsx'
import { Input, type InputProps } from '#src/ui/input.tsx'

export type PasswordInputProps = Omit<InputProps, 'type'>

export function PasswordInput(props: PasswordInputProps) {
  const [isShown, setIsShown] = useState(false)
  return (
    <span className="relative block">
      <Input
        {...props}
        type={isShown ? 'text' : 'password'}
        className="pr-11"
        autoCapitalize="none"
        spellCheck={false}
      />
      <IconButton
        label={isShown ? 'Hide the password' : 'Show the password'}
        className="!absolute top-0 right-0"
        onClick={() => setIsShown(!isShown)}
      >
        {isShown ? <EyeOff size={16} aria-hidden /> : <Eye size={16} aria-hidden />}
      </IconButton>
    </span>
  )
}
