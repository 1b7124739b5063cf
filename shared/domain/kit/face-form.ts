import type { ModifierNumbers } from './schema.ts'

export type FaceForm = 'disc' | 'rectangle' | 'ball'

/** The form of an emitting face. */
export function faceFormOf(shape: ModifierNumbers['shape']): FaceForm {
  if (shape === 'lantern') return 'ball'
  return shape === 'softbox' || shape === 'strip' ? 'rectangle' : 'disc'
}

/**
 * Radius of the disc that a face counts as for how its light falls off close by, d²/(d² + r²), metres: its own, or that
 * of a rectangle's area. An even ball's light falls off as from its middle (a Lambertian sphere, closed form): 0.
 */
export function discRadiusM({ shape, widthM, heightM }: Pick<ModifierNumbers, 'shape' | 'widthM' | 'heightM'>): number {
  switch (faceFormOf(shape)) {
    case 'ball':
      return 0
    case 'disc':
      return Math.sqrt(widthM * heightM) / 2
    case 'rectangle':
      return Math.sqrt((widthM * heightM) / Math.PI)
  }
}
