import type { Role } from '#shared/access/roles.ts'
import type { Section } from '#shared/domain/shoots/readiness.ts'

export type SectionLink = {
  /** Last part of the address. */
  path: string
  label: string
  /** On phones. */
  short: string
  /** Whose lamp stands beside it; null for none. */
  lamp: Section | null
}

const BRIEF: SectionLink = { path: 'brief', label: 'Brief', short: 'Brief', lamp: 'brief' }
const BOARD: SectionLink = { path: 'board', label: 'Board', short: 'Board', lamp: 'board' }
const LOOKS: SectionLink = { path: 'looks', label: 'Looks', short: 'Looks', lamp: 'looks' }
const LIGHTING: SectionLink = { path: 'lighting', label: 'Lighting', short: 'Lighting', lamp: 'lighting' }
const ORDER: SectionLink = { path: 'order', label: 'Running order', short: 'Order', lamp: 'order' }
const DAY: SectionLink = { path: 'day', label: 'On the day', short: 'Day', lamp: 'day' }
const SIGN_OFF: SectionLink = { path: 'sign-off', label: 'Sign-off', short: 'Sign-off', lamp: null }
const PEOPLE: SectionLink = { path: 'people', label: 'People', short: 'People', lamp: null }

export type Sections = {
  working: readonly SectionLink[]
  beside: readonly SectionLink[]
  onPhone: readonly SectionLink[]
}

/** The sections of a shoot in working order, as a role sees them. */
export function sectionsFor(role: Role): Sections {
  return role === 'client'
    ? {
        working: [BOARD, LOOKS, { ...SIGN_OFF, lamp: 'looks' }, ORDER],
        beside: [PEOPLE],
        onPhone: [BOARD, LOOKS, { ...SIGN_OFF, lamp: 'looks' }, ORDER],
      }
    : {
        working: [BRIEF, BOARD, LOOKS, LIGHTING, ORDER, DAY],
        beside: [SIGN_OFF, PEOPLE],
        onPhone: [BOARD, LOOKS, ORDER, DAY],
      }
}

const ALL: readonly SectionLink[] = [BRIEF, BOARD, LOOKS, LIGHTING, ORDER, DAY, SIGN_OFF, PEOPLE]

/** The name of a section, also of one that a role is not led to and opens by its address. */
export function sectionLabel(path: string): string | undefined {
  return ALL.find((link) => link.path === path)?.label
}
