import { useMemo } from 'react'
import { placeIdSchema, type LightId, type PlaceId, type PropId, type SetupId } from '#shared/ids.ts'
import type { Background, Camera, Point, PROP_KINDS } from '#shared/domain/lighting/schema.ts'
import { lights, props, setups, sitterPlaces } from '#shared/realtime/documents.ts'
import { LOCAL_ORIGIN, type Patch, patchItem, putItems, removeItems } from '#shared/realtime/collection.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { newId } from '#src/lib/new-id.ts'
import { useDoc } from '#src/realtime/shoot-realtime.tsx'
import { type Undo, useUndo } from '#src/realtime/use-undo.ts'
import { duplicateLight, newLight, newProp, type NewLight, shiftedRank } from './new-items.ts'
import { type DrawingKind, type Part, moved, partKey, partsOf, pointOf } from './parts.ts'

export type LightPatch = { id: LightId; patch: Patch<typeof lights> }

export type SetupWriter = {
  undo: Undo
  patchSetup(patch: Patch<typeof setups>): void
  patchCamera(patch: Partial<Camera>): void
  patchBackground(patch: Partial<Background>): void
  patchLight(id: LightId, patch: Patch<typeof lights>): void
  /** Several lights at once, as one step of undo. */
  patchLights(patches: readonly LightPatch[]): void
  patchPlace(id: PlaceId, patch: Patch<typeof sitterPlaces>): void
  patchProp(id: PropId, patch: Patch<typeof props>): void
  addLight(light: NewLight): LightId
  duplicateLight(id: LightId): LightId | null
  removeLight(id: LightId): void
  addPlace(): PlaceId
  removePlace(id: PlaceId): void
  addProp(kind: (typeof PROP_KINDS)[number]): PropId
  removeProp(id: PropId): void
  /** One place earlier (−1) or later (1) in the order of building. */
  shiftLight(id: LightId, by: -1 | 1): void
  /** Changes where a part is, from where it is written now: one change, one step of undo. */
  move(part: Part, change: (written: Point) => Point): void
  /** Writes where a part was dropped in a drawing; what the drawing does not show stays as somebody has written it. */
  drop(part: Part, at: Point, drawing: DrawingKind): void
}

/** Changes of one setup; each is a step of undo of its own. */
export function useSetupWriter(whole: WholeSetup): SetupWriter {
  const doc = useDoc('lighting')
  const undo = useUndo(['lighting'])
  const { stop } = undo
  const changes = useMemo(() => {
    const setupId: SetupId = whole.setup.id
    const { camera, background } = whole.setup
    const step = (write: () => void) => {
      stop()
      write()
      stop()
    }
    const patchSetup = (patch: Patch<typeof setups>) => step(() => patchItem(doc, setups, setupId, patch))
    const patchLight = (id: LightId, patch: Patch<typeof lights>) => step(() => patchItem(doc, lights, id, patch))
    const patchLights = (patches: readonly LightPatch[]) =>
      step(() =>
        doc.transact(() => {
          for (const { id, patch } of patches) patchItem(doc, lights, id, patch)
        }, LOCAL_ORIGIN),
      )
    const patchPlace = (id: PlaceId, patch: Patch<typeof sitterPlaces>) =>
      step(() => patchItem(doc, sitterPlaces, id, patch))
    const patchProp = (id: PropId, patch: Patch<typeof props>) => step(() => patchItem(doc, props, id, patch))
    function move(part: Part, change: (written: Point) => Point) {
      const key = partKey(part)
      const written = partsOf(whole).find((candidate) => partKey(candidate) === key)
      if (!written) return
      const at = change(pointOf(written, whole))
      switch (written.kind) {
        case 'light':
          return patchLight(written.light.id, { at })
        case 'aim':
          return patchLight(written.light.id, { aim: at })
        case 'place':
          return patchPlace(written.place.id, { at: [at[0], at[2]], eyeHeightM: at[1] })
        case 'prop':
          return patchProp(written.prop.id, { at })
        case 'camera':
          return patchSetup({ camera: { ...camera, at } })
      }
    }
    return {
      patchSetup,
      patchCamera: (patch: Partial<Camera>) => patchSetup({ camera: { ...camera, ...patch } }),
      patchBackground: (patch: Partial<Background>) => patchSetup({ background: { ...background, ...patch } }),
      patchLight,
      patchLights,
      patchPlace,
      patchProp,
      addLight(input: NewLight) {
        const light = newLight(whole, input, Math.random)
        step(() => putItems(doc, lights, [light], Math.random))
        return light.id
      },
      duplicateLight(id: LightId) {
        const light = duplicateLight(whole, id, Math.random)
        if (!light) return null
        step(() => putItems(doc, lights, [light], Math.random))
        return light.id
      },
      removeLight: (id: LightId) => step(() => removeItems(doc, lights, [id], Date.now())),
      addPlace() {
        const id = placeIdSchema.parse(newId())
        const x = whole.places.length === 0 ? 0 : Math.max(...whole.places.map((place) => place.at[0])) + 0.6
        step(() => putItems(doc, sitterPlaces, [{ id, setupId, at: [x, 0], eyeHeightM: 1.55 }], Math.random))
        return id
      },
      removePlace: (id: PlaceId) => step(() => removeItems(doc, sitterPlaces, [id], Date.now())),
      addProp(kind: (typeof PROP_KINDS)[number]) {
        const prop = newProp(whole, kind)
        step(() => putItems(doc, props, [prop], Math.random))
        return prop.id
      },
      removeProp: (id: PropId) => step(() => removeItems(doc, props, [id], Date.now())),
      shiftLight(id: LightId, by: -1 | 1) {
        const rank = shiftedRank(whole.lights, id, by, Math.random)
        if (rank !== null) patchLight(id, { rank })
      },
      move,
      drop: (part: Part, at: Point, drawing: DrawingKind) => move(part, (written) => moved(written, at, drawing)),
    }
  }, [doc, stop, whole])
  return { undo, ...changes }
}
