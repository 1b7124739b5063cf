import { useEffect, useState } from 'react'
import { Waiting } from '#src/ui/waiting.tsx'

const LONG_MS = 8_000

/** While a shoot's documents come from this device or the server; after a while it says what that hangs on. */
export function OpeningShoot({ title }: { title: string }) {
  const [isLong, setIsLong] = useState(false)
  useEffect(() => {
    const timer = setTimeout(() => setIsLong(true), LONG_MS)
    return () => clearTimeout(timer)
  }, [])
  return (
    <div className="flex min-h-dvh flex-col items-center justify-center">
      <Waiting label={`Opening ${title}`} className={isLong ? 'pb-3' : ''} />
      {isLong && (
        <p role="status" className="max-w-md px-6 text-center text-base text-ink-soft">
          The server does not answer, and not all of this shoot is on this device yet. It opens by itself as soon as
          there is a connection.
        </p>
      )}
    </div>
  )
}
