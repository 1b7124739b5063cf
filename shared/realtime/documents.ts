import {
  areaSchema,
  frameSchema,
  noteSchema,
  paletteSchema,
  shotSchema,
  tagSchema,
} from '#shared/domain/board/schema.ts'
import { daySchema, moveSchema, ruleSchema, setSchema, shotPlanSchema } from '#shared/domain/plan/schema.ts'
import { lookSchema, pieceSchema, sitterSchema } from '#shared/domain/looks/schema.ts'
import { lightSchema, propSchema, setupSchema, sitterPlaceSchema } from '#shared/domain/lighting/schema.ts'
import { dayShotSchema, kitCheckSchema, tickSchema } from '#shared/domain/day/schema.ts'
import { collection } from './collection.ts'

/**
 * The five documents of a shoot. Yjs cannot give two people different rights inside one document, so each has one
 * set of writers (shared/access), and what not everyone may read is in none of them.
 */
export const DOCUMENT_KINDS = ['board', 'plan', 'looks', 'lighting', 'day'] as const
export type DocumentKind = (typeof DOCUMENT_KINDS)[number]

/** Shape of the documents; a change that an older client cannot read bumps it and says how that client fares. */
export const DOCUMENT_SCHEMA = 1

export const frames = collection('frames', frameSchema)
export const notes = collection('notes', noteSchema)
export const tags = collection('tags', tagSchema)
export const areas = collection('areas', areaSchema)
export const palettes = collection('palettes', paletteSchema)
export const shots = collection('shots', shotSchema, { lookIds: 'look:' })

export const days = collection('days', daySchema)
export const sets = collection('sets', setSchema)
export const moves = collection('moves', moveSchema)
export const shotPlans = collection('shots', shotPlanSchema)
export const rules = collection('rules', ruleSchema)

export const sitters = collection('sitters', sitterSchema)
export const looks = collection('looks', lookSchema, { pieceIds: 'piece:', pictureIds: 'picture:' })
export const pieces = collection('pieces', pieceSchema)

export const setups = collection('setups', setupSchema)
export const lights = collection('lights', lightSchema)
export const sitterPlaces = collection('places', sitterPlaceSchema)
export const props = collection('props', propSchema)

export const dayShots = collection('shots', dayShotSchema)
export const ticks = collection('ticks', tickSchema)
export const kitChecks = collection('kit', kitCheckSchema)

/** The collections of each document: all its root maps, for readers that go through a whole document. */
export const COLLECTIONS = {
  board: { frames, notes, tags, areas, palettes, shots },
  plan: { days, sets, moves, shotPlans, rules },
  looks: { sitters, looks, pieces },
  lighting: { setups, lights, sitterPlaces, props },
  day: { dayShots, ticks, kitChecks },
} as const
