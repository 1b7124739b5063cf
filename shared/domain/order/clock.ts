/**
 * A clock time as people read it, from minutes since midnight of the shoot's civil day: `630` → "10:30".
 *
 * Parts of a minute are cut off; past midnight the hours start again ("00:30").
 */
export function clockLabel(atMin: number): string {
  const whole = Math.floor(atMin + 1e-9)
  const inDay = ((whole % 1440) + 1440) % 1440
  return `${String(Math.floor(inDay / 60)).padStart(2, '0')}:${String(inDay % 60).padStart(2, '0')}`
}

/** Minutes as people read them, rounded up to whole ones: `8.5` → "9 min". */
export function minutesLabel(minutes: number): string {
  return `${Math.ceil(minutes - 1e-9)} min`
}

/** "a", "a and b", "a, b and c". */
export function listLabel(words: readonly string[]): string {
  if (words.length < 2) return words[0] ?? ''
  return `${words.slice(0, -1).join(', ')} and ${words.at(-1) ?? ''}`
}
