import type { Box } from '#shared/domain/board/schema.ts'
import type { PlannedLook } from '#shared/domain/plan/read-plan.ts'
import type { WallItem, WallKind } from './wall-item.ts'

export const KIND_WORDS: Readonly<Record<WallKind, string>> = {
  frame: 'Frame',
  note: 'Note',
  tag: 'Tag',
  area: 'Area',
  palette: 'Palette',
}

/** Whose look it is: the character, else the sitter, else the look's own name. */
export function wearerOf({ look, sitter }: PlannedLook): string {
  return sitter?.character || sitter?.name || look.name
}

/** "Night coat · The Astronomer" */
export function lookLabel(planned: PlannedLook): string {
  const wearer = wearerOf(planned)
  return wearer === planned.look.name ? wearer : `${planned.look.name} · ${wearer}`
}

function firstWords(text: string): string {
  const line = text.trim().replace(/\s+/g, ' ')
  return line.length > 60 ? `${line.slice(0, 57)}…` : line
}

/** The name of a thing on the wall, as it is announced: "Frame Collar high". */
export function nameOf(entry: WallItem, looks?: ReadonlyMap<string, PlannedLook>): string {
  const kind = KIND_WORDS[entry.kind]
  switch (entry.kind) {
    case 'frame':
      return `${kind} ${firstWords(entry.item.caption) || 'without caption'}`
    case 'note':
      return `${kind} ${firstWords(entry.item.text) || 'without words'}`
    case 'tag': {
      const look = entry.item.lookId === null ? undefined : looks?.get(entry.item.lookId)
      return `${kind} ${firstWords(entry.item.title) || (look ? wearerOf(look) : '') || firstWords(entry.item.text) || 'without words'}`
    }
    case 'area':
      return `${kind} ${firstWords(entry.item.title) || 'without title'}`
    case 'palette':
      return `${kind} ${firstWords(entry.item.title) || `of ${entry.item.colours.length} colours`}`
  }
}

/** "Frame Collar high", "3 things" */
export function nameOfAll(entries: readonly WallItem[], looks?: ReadonlyMap<string, PlannedLook>): string {
  const [first] = entries
  return first && entries.length === 1 ? nameOf(first, looks) : `${entries.length} things`
}

/** Where something went, in words: "120 right, 80 down"; "its old place" for no way at all. */
export function wayWords(from: Box, to: Box): string {
  const dx = Math.round(to[0] - from[0])
  const dy = Math.round(to[1] - from[1])
  const parts = [
    dx === 0 ? '' : `${Math.abs(dx)} ${dx > 0 ? 'right' : 'left'}`,
    dy === 0 ? '' : `${Math.abs(dy)} ${dy > 0 ? 'down' : 'up'}`,
  ].filter((part) => part !== '')
  return parts.join(', ') || 'its old place'
}

export function minutesWords(minutes: number): string {
  const whole = Math.round(minutes)
  return `${whole} min`
}
