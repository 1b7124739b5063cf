/** The lamp's three states: not begun or waiting, under way or changed since, ready. */
export const LAMPS = ['unlit', 'half', 'lit'] as const
export type Lamp = (typeof LAMPS)[number]

/** Sections of a shoot in working order, as far as they are built. */
export const SECTIONS = ['brief', 'board', 'looks', 'lighting', 'order', 'day'] as const
export type Section = (typeof SECTIONS)[number]
