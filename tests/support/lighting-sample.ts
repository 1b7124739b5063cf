import { DEFAULT_MINUTES } from '#shared/domain/plan/minutes.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { type Light, lightSchema, propSchema, setupSchema, sitterPlaceSchema } from '#shared/domain/lighting/schema.ts'
import type { z } from 'zod'

export const MINUTES = DEFAULT_MINUTES

/** A version 4 id from a small number. */
export function id(n: number): string {
  return `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`
}

const stated = (value: number) => ({ value, from: 'assumed' as const, source: 'sample' })

export const FLASH_KIT = id(901)
export const MAINS_KIT = id(902)

export function unit(kitId = FLASH_KIT, more: Record<string, unknown> = {}) {
  return {
    kitId,
    version: 1,
    name: 'Small flash',
    numbers: {
      guideNumberM: stated(40),
      zoom: [],
      minPowerDenominator: 128,
      flashColourK: stated(5500),
      fullPops: stated(150),
      fullRecycleS: stated(3.5),
      massKg: stated(0.5),
      remotePower: true,
      ...more,
    },
  }
}

export function modifier(n: number, name: string, more: Record<string, unknown> = {}) {
  return {
    kitId: id(n),
    version: 1,
    name,
    numbers: {
      shape: 'octa' as const,
      widthM: 0.9,
      heightM: 0.9,
      lossStops: stated(0),
      beamDeg: null,
      massKg: stated(1),
      ...more,
    },
  }
}

export const OCTA = modifier(911, '90 cm octa')
export const SOFTBOX = modifier(912, '60 cm softbox')
export const GRID = modifier(913, '10° grid', { shape: 'grid', beamDeg: stated(10) })

export function gel(n: number, name: string, miredShift: number, transmission: number) {
  return {
    kitId: id(n),
    version: 1,
    name,
    numbers: {
      miredShift: stated(miredShift),
      printedMired: null,
      transmission: stated(transmission),
      colour: '#ffffff',
    },
  }
}
export const FULL_WARM = gel(921, 'Full warm +167', 167, 0.47)
export const HALF_BLUE = gel(922, 'Half blue −68', -68, 0.52)

export function support(n: number, name: string, kind: 'stand' | 'boom', maxHeightM = 2.4, maxLoadKg = 3) {
  return {
    kitId: id(n),
    version: 1,
    name,
    numbers: { kind, maxHeightM: stated(maxHeightM), maxLoadKg: stated(maxLoadKg) },
  }
}
export const STAND = support(931, '2.4 m stand', 'stand')
export const BOOM = support(932, 'Boom arm', 'boom', 3)

type LightInput = Omit<z.input<typeof lightSchema>, 'id' | 'setupId' | 'unit' | 'power'> &
  Partial<z.input<typeof lightSchema>>

export function light(n: number, input: LightInput): Light {
  return lightSchema.parse({ id: id(n), setupId: id(1), unit: unit(), power: 0.25, support: STAND, ...input })
}

/** A setup with its camera 3 m in front and a sitter whose eyes are at 1.5 m. */
export function whole(input: {
  n?: number
  lights?: Light[]
  props?: Partial<z.input<typeof propSchema>>[]
  camera?: Partial<z.input<typeof setupSchema>['camera']>
  background?: Partial<z.input<typeof setupSchema>['background']>
  ambientLux?: number
  eyeHeightM?: number
}): WholeSetup {
  const setupId = id(input.n ?? 1)
  return {
    setup: setupSchema.parse({
      id: setupId,
      name: 'Sample',
      camera: {
        at: [0, 1.4, 3],
        focalMm: 85,
        fNumber: 8,
        iso: 100,
        shutterS: 1 / 160,
        whiteBalanceK: 5500,
        ...input.camera,
      },
      background: { zM: -2, widthM: 6, heightM: 3, colour: '#808080', what: 'grey wall', ...input.background },
      ambientLux: input.ambientLux ?? null,
    }),
    lights: (input.lights ?? []).map((entry) => lightSchema.parse({ ...entry, setupId })),
    places: [sitterPlaceSchema.parse({ id: id(801), setupId, at: [0, 0], eyeHeightM: input.eyeHeightM ?? 1.5 })],
    props: (input.props ?? []).map((prop, index) =>
      propSchema.parse({
        id: id(850 + index),
        setupId,
        kind: 'panel',
        name: 'White panel',
        at: [1, 0.75, 1],
        widthM: 1,
        heightM: 1.5,
        ...prop,
      }),
    ),
  }
}
