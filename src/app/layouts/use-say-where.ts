import { useEffect } from 'react'
import { useSetPresence } from '#src/realtime/use-presence.ts'

/** Tells the others which section of the shoot is open here. */
export function useSayWhere(section: string): void {
  const setPresence = useSetPresence()
  useEffect(() => {
    setPresence({ at: section })
  }, [section, setPresence])
}
