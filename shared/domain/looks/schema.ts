import { z } from 'zod'
import { lookIdSchema, pieceIdSchema, sitterIdSchema, uploadIdSchema } from '#shared/ids.ts'
import { civilDateSchema, clockMinSchema, colourSchema, lineSchema, proseSchema } from '#shared/domain/text.ts'

/** A person photographed. Contacts and sizes are private and live in a table, never here. */
export const sitterSchema = z.object({
  id: sitterIdSchema,
  name: lineSchema(80),
  character: proseSchema(80).default(''),
  /** Here from–to, minutes since midnight in the shoot's zone; null: the whole day. */
  hours: z.tuple([clockMinSchema, clockMinSchema]).nullable().default(null),
  /** Minutes in hair and make-up for the first look, and again when hair or make-up differs. */
  chairMin: z.number().min(0).max(360).default(0),
  /** Minutes of travel to the place, for the call. */
  travelMin: z.number().min(0).max(720).default(0),
  underAge: z.boolean().default(false),
})
export type Sitter = z.infer<typeof sitterSchema>

export const PIECE_KINDS = ['garment', 'accessory', 'footwear', 'hairpiece', 'jewellery', 'prop'] as const
export const PIECE_STATUSES = ['idea', 'to buy', 'to make', 'hired', 'pulled', 'fitted', 'packed', 'returned'] as const

export const pieceSchema = z.object({
  id: pieceIdSchema,
  kind: z.enum(PIECE_KINDS).default('garment'),
  name: lineSchema(120),
  colour: colourSchema.nullable().default(null),
  status: z.enum(PIECE_STATUSES).default('idea'),
  source: proseSchema(120).default(''),
  dueBack: civilDateSchema.nullable().default(null),
  note: proseSchema(1000).default(''),
})
export type Piece = z.infer<typeof pieceSchema>

/**
 * A look: pieces with hair and make-up on one sitter. `pieceIds` and `pictureIds` are membership keys in the
 * document (one key per member, ordered by a fractional key), so two people adding at once both keep theirs.
 * The first picture is the hero.
 */
export const lookSchema = z.object({
  id: lookIdSchema,
  sitterId: sitterIdSchema,
  name: lineSchema(80),
  hair: proseSchema(300).default(''),
  makeUp: proseSchema(300).default(''),
  note: proseSchema(2000).default(''),
  changeMin: z.number().min(0).max(240).default(10),
  alternativeOf: lookIdSchema.nullable().default(null),
  /** Fractional key among the sitter's looks. */
  rank: z.string().min(1).max(256).default('a0'),
  pieceIds: z.array(pieceIdSchema).default([]),
  pictureIds: z.array(uploadIdSchema).default([]),
})
export type Look = z.infer<typeof lookSchema>
