import { CLOSE } from '#shared/realtime/protocol.ts'

/** Why a shoot's documents stay shut, in words. Null for codes after which the page goes on by itself. */
export function closedWords(code: number): { title: string; text: string; again: boolean } | null {
  switch (code) {
    case CLOSE.noAccess:
    case CLOSE.unknown:
      return {
        title: 'You are not in this shoot any more',
        text: 'The photographer took you out, or the shoot is gone. What the server has from you is kept there; ask the photographer if that is a mistake.',
        again: false,
      }
    case CLOSE.crowded:
      return {
        title: 'Too many windows',
        text: 'You have this shoot open in too many places, or too many people are in it. Close some windows and load the page again. What you did here is kept on this device and sent then.',
        again: true,
      }
    case CLOSE.abuse:
      return {
        title: 'The server could not read what this page sent',
        text: 'The page may be of an older version. Load it again; what you did is kept on this device.',
        again: true,
      }
    default:
      return null
  }
}

/** Whether the shoot is closed to this person for good, so that nothing of theirs can be sent any more. */
export function isShut(code: number | null): boolean {
  return code === CLOSE.noAccess || code === CLOSE.unknown
}
