import type { Background, Walled } from '#shared/domain/lighting/schema.ts'
import type { Room } from '#shared/domain/shoots/schema.ts'

/**
 * Walls and ceiling from a room's size in the brief, with the sitter midway between the side walls and the background as
 * the room's back wall (assumption: where the sitter stands in the room is nowhere written). Null while a size is missing.
 */
export function walledFrom(room: Pick<Room, 'widthM' | 'depthM' | 'ceilingM'>, background: Background): Walled | null {
  if (room.widthM === null || room.depthM === null || room.ceilingM === null || room.ceilingM < 0.5) return null
  return {
    leftM: room.widthM / 2,
    rightM: room.widthM / 2,
    frontM: Math.max(0, room.depthM + background.zM),
    ceilingM: room.ceilingM,
  }
}
