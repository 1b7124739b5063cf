import { useQuery } from '@tanstack/react-query'
import { useMemo } from 'react'
import type { KitItemId } from '#shared/ids.ts'
import type { KitItem } from '#shared/api/kit.ts'
import { faultsOf } from '#shared/domain/kit/faults.ts'
import type { PanelNumbers } from '#shared/domain/kit/schema.ts'
import {
  type LightGel,
  type LightModifier,
  type LightSupport,
  type LightUnit,
  isLamp,
} from '#shared/domain/lighting/schema.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { lightingQueries } from './queries.ts'

export type KitPanel = { kitId: KitItemId; version: number; name: string; numbers: PanelNumbers }

export type Kit = {
  /** Flash heads and lamps. */
  units: LightUnit[]
  modifiers: LightModifier[]
  /** Panels and flags that stand on their own. */
  panels: KitPanel[]
  gels: LightGel[]
  supports: LightSupport[]
  /** Newest version in the kit room by id; unknown ids are no longer there. */
  versions: ReadonlyMap<string, number>
  /** How many the studio has, by id. */
  quantities: ReadonlyMap<string, number>
  state: 'there' | 'coming' | 'not there'
}

/** A unit in a list: lamps that burn all the time say so. */
export function unitWords(unit: LightUnit): string {
  return isLamp(unit.numbers) ? `${unit.name} · lamp` : unit.name
}

function sortKit(kit: readonly KitItem[]): Omit<Kit, 'state'> {
  const units: LightUnit[] = []
  const modifiers: LightModifier[] = []
  const panels: KitPanel[] = []
  const gels: LightGel[] = []
  const supports: LightSupport[] = []
  for (const { id: kitId, version, name, body } of kit) {
    // Nothing can be worked out with it: it is kept out until the kit room has its numbers.
    if (faultsOf(body).length > 0) continue
    const own = { kitId, version, name }
    switch (body.kind) {
      case 'unit':
        units.push({ ...own, numbers: body.numbers })
        break
      case 'modifier':
        modifiers.push({ ...own, numbers: body.numbers })
        break
      case 'lamp':
        units.push({ ...own, numbers: body.numbers })
        break
      case 'panel':
        panels.push({ ...own, numbers: body.numbers })
        break
      case 'gel':
        gels.push({ ...own, numbers: body.numbers })
        break
      case 'support':
        supports.push({ ...own, numbers: body.numbers })
        break
    }
  }
  return {
    units,
    modifiers,
    panels,
    gels,
    supports,
    versions: new Map(kit.map((item) => [item.id, item.version])),
    quantities: new Map(kit.map((item) => [item.id, item.quantity])),
  }
}

/** The studio's kit, sorted into what a light is made of. */
export function useKit(): Kit {
  const { id } = useShoot()
  const { data, isPending } = useQuery(lightingQueries.kit(id))
  return useMemo(
    () => ({ ...sortKit(data?.kit ?? []), state: data ? 'there' : isPending ? 'coming' : 'not there' }),
    [data, isPending],
  )
}
