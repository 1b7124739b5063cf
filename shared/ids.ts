import { z } from 'zod'

/** A version-independent UUID in lower case, made on the device or the server. */
const uuid = () => z.guid().transform((value) => value.toLowerCase())

export const userIdSchema = z.string().min(1).max(64).brand<'UserId'>()
export const studioIdSchema = uuid().pipe(z.string().brand<'StudioId'>())
export const shootIdSchema = uuid().pipe(z.string().brand<'ShootId'>())
export const roomIdSchema = uuid().pipe(z.string().brand<'RoomId'>())
export const deliverableIdSchema = uuid().pipe(z.string().brand<'DeliverableId'>())
export const invitationIdSchema = uuid().pipe(z.string().brand<'InvitationId'>())
export const uploadIdSchema = uuid().pipe(z.string().brand<'UploadId'>())
export const kitItemIdSchema = uuid().pipe(z.string().brand<'KitItemId'>())
export const recipeIdSchema = uuid().pipe(z.string().brand<'RecipeId'>())
export const commentIdSchema = uuid().pipe(z.string().brand<'CommentId'>())
export const signOffIdSchema = uuid().pipe(z.string().brand<'SignOffId'>())
export const versionIdSchema = uuid().pipe(z.string().brand<'VersionId'>())
export const docIdSchema = uuid().pipe(z.string().brand<'DocId'>())

export const frameIdSchema = uuid().pipe(z.string().brand<'FrameId'>())
export const noteIdSchema = uuid().pipe(z.string().brand<'NoteId'>())
export const tagIdSchema = uuid().pipe(z.string().brand<'TagId'>())
export const areaIdSchema = uuid().pipe(z.string().brand<'AreaId'>())
export const paletteIdSchema = uuid().pipe(z.string().brand<'PaletteId'>())
export const shotIdSchema = uuid().pipe(z.string().brand<'ShotId'>())
export const dayIdSchema = uuid().pipe(z.string().brand<'DayId'>())
export const setIdSchema = uuid().pipe(z.string().brand<'SetId'>())
export const ruleIdSchema = uuid().pipe(z.string().brand<'RuleId'>())
export const sitterIdSchema = uuid().pipe(z.string().brand<'SitterId'>())
export const lookIdSchema = uuid().pipe(z.string().brand<'LookId'>())
export const pieceIdSchema = uuid().pipe(z.string().brand<'PieceId'>())
export const setupIdSchema = uuid().pipe(z.string().brand<'SetupId'>())
export const lightIdSchema = uuid().pipe(z.string().brand<'LightId'>())
export const placeIdSchema = uuid().pipe(z.string().brand<'PlaceId'>())
export const propIdSchema = uuid().pipe(z.string().brand<'PropId'>())

export type UserId = z.infer<typeof userIdSchema>
export type StudioId = z.infer<typeof studioIdSchema>
export type ShootId = z.infer<typeof shootIdSchema>
export type RoomId = z.infer<typeof roomIdSchema>
export type DeliverableId = z.infer<typeof deliverableIdSchema>
export type InvitationId = z.infer<typeof invitationIdSchema>
export type UploadId = z.infer<typeof uploadIdSchema>
export type KitItemId = z.infer<typeof kitItemIdSchema>
export type RecipeId = z.infer<typeof recipeIdSchema>
export type CommentId = z.infer<typeof commentIdSchema>
export type SignOffId = z.infer<typeof signOffIdSchema>
export type VersionId = z.infer<typeof versionIdSchema>
export type DocId = z.infer<typeof docIdSchema>
export type FrameId = z.infer<typeof frameIdSchema>
export type NoteId = z.infer<typeof noteIdSchema>
export type TagId = z.infer<typeof tagIdSchema>
export type AreaId = z.infer<typeof areaIdSchema>
export type PaletteId = z.infer<typeof paletteIdSchema>
export type ShotId = z.infer<typeof shotIdSchema>
export type DayId = z.infer<typeof dayIdSchema>
export type SetId = z.infer<typeof setIdSchema>
export type RuleId = z.infer<typeof ruleIdSchema>
export type SitterId = z.infer<typeof sitterIdSchema>
export type LookId = z.infer<typeof lookIdSchema>
export type PieceId = z.infer<typeof pieceIdSchema>
export type SetupId = z.infer<typeof setupIdSchema>
export type LightId = z.infer<typeof lightIdSchema>
export type PlaceId = z.infer<typeof placeIdSchema>
export type PropId = z.infer<typeof propIdSchema>
