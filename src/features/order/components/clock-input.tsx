import { Input } from '#src/ui/input.tsx'
import { clockField, minutesOf } from '../words.ts'

export type ClockInputProps = {
  valueMin: number
  onChange: (minutes: number) => void
  /** Times before this one are of the next day: a shoot may go on past midnight. */
  notBeforeMin?: number
  readOnly?: boolean
}

/** A clock time in minutes since midnight of the shoot's day. */
export function ClockInput({ valueMin, onChange, notBeforeMin = 0, readOnly = false }: ClockInputProps) {
  return (
    <Input
      type="time"
      readOnly={readOnly}
      value={clockField(valueMin)}
      onChange={(event) => {
        const minutes = minutesOf(event.target.value)
        if (minutes !== null) onChange(minutes < notBeforeMin ? minutes + 1440 : minutes)
      }}
    />
  )
}
