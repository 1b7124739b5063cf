import { useMutation, useQueryClient } from '@tanstack/react-query'
import { kitListSchema } from '#shared/api/kit.ts'
import type { LightUnit } from '#shared/domain/lighting/schema.ts'
import { ApiError, api } from '#src/lib/api.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { type Measured, measuredItem, measuredUnit } from './meter-draft.ts'
import { lightingQueries } from './queries.ts'

export type KeptReading = {
  light: Measured['light']
  /** The light's unit with its reading, to be written into the setup. */
  unit: LightUnit
  /** Why the kit room does not have it; null: it has. */
  notKept: string | null
}

/** Writes readings into the kit room where this person may; each light gets its own whatever becomes of that. */
export function useKeepReadings() {
  const queryClient = useQueryClient()
  const { id, studioId, inStudio } = useShoot()
  return useMutation({
    meta: { shown: true },
    mutationFn: async ({ measured, when }: { measured: readonly Measured[]; when: string }): Promise<KeptReading[]> => {
      const kept: KeptReading[] = []
      for (const kitId of new Set(measured.map(({ light }) => light.unit.kitId))) {
        const ofItem = measured.filter(({ light }) => light.unit.kitId === kitId)
        const item = queryClient
          .getQueryData(lightingQueries.kit(id).queryKey)
          ?.kit.find((candidate) => candidate.id === kitId)
        const changed = item && measuredItem(item, ofItem, when)
        let notKept: string | null = 'This unit is not in the kit room: the reading is in this light only.'
        if (!inStudio)
          notKept = 'You are not in the studio: the reading is in this light, and the kit room stays as it is.'
        else if (changed) {
          const { id: _, ...body } = changed
          notKept = await api(`/studios/${studioId}/kit/${kitId}`, {
            method: 'PUT',
            body,
            response: kitListSchema,
          }).then(
            (list) => {
              queryClient.setQueryData(lightingQueries.kit(id).queryKey, list)
              return null
            },
            (error: unknown) => (error instanceof ApiError ? error.message : 'The kit room could not be told.'),
          )
        }
        const version = changed && notKept === null ? { before: changed.version, now: changed.version + 1 } : null
        kept.push(...ofItem.map((one) => ({ light: one.light, unit: measuredUnit(one, when, version), notKept })))
      }
      return kept
    },
    onSettled: () => queryClient.invalidateQueries({ queryKey: lightingQueries.kit(id).queryKey }),
  })
}
