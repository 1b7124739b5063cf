import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { isLamp } from './schema.ts'

export const KIT_LIST_KINDS = ['camera', 'unit', 'modifier', 'gel', 'support', 'set'] as const
export type KitListKind = (typeof KIT_LIST_KINDS)[number]

/** Something to bring. */
export type KitListItem = {
  key: string
  kind: KitListKind
  name: string
  /** As many as the setup that needs most of them: setups follow each other and share. */
  count: number
  /** Names of the setups it is for, in their order. */
  setups: string[]
}

type Needed = { key: string; kind: KitListKind; name: string }

function neededIn(whole: WholeSetup): Needed[] {
  const { setup, lights, props } = whole
  const needed: Needed[] = [
    { key: `lens:${setup.camera.focalMm}`, kind: 'camera', name: `Camera with ${setup.camera.focalMm} mm` },
  ]
  const add = (kind: KitListKind, part: { kitId: string; name: string } | null, name = part?.name ?? '') => {
    if (part) needed.push({ key: `${part.kitId}:${name}`, kind, name })
  }
  for (const light of lights) {
    add('unit', light.unit, isLamp(light.unit.numbers) ? `${light.unit.name} (burns all the time)` : light.unit.name)
    add('modifier', light.modifier)
    for (const gel of light.gels) add('gel', gel)
    add('support', light.support)
  }
  for (const prop of props) needed.push({ key: `set:${prop.name}`, kind: 'set', name: prop.name })
  const { what } = setup.background
  if (what !== '') needed.push({ key: `set:${what}`, kind: 'set', name: what })
  return needed
}

/** What these setups need, counted, by kind in the order of KIT_LIST_KINDS and then as they come. */
export function kitListOf(setups: readonly WholeSetup[]): KitListItem[] {
  const items = new Map<string, KitListItem>()
  for (const whole of setups) {
    const here = new Map<string, number>()
    for (const { key, kind, name } of neededIn(whole)) {
      const count = (here.get(key) ?? 0) + 1
      here.set(key, count)
      const item = items.get(key) ?? { key, kind, name, count: 0, setups: [] }
      item.count = Math.max(item.count, count)
      if (item.setups.at(-1) !== whole.setup.name) item.setups.push(whole.setup.name)
      items.set(key, item)
    }
  }
  return [...items.values()].sort((a, b) => KIT_LIST_KINDS.indexOf(a.kind) - KIT_LIST_KINDS.indexOf(b.kind))
}

/** Units, modifiers, gels and supports of which a studio has fewer than are needed, by kit id. */
export function missingFrom(
  setups: readonly WholeSetup[],
  owned: ReadonlyMap<string, number>,
): { name: string; needed: number; owned: number }[] {
  return kitListOf(setups).flatMap((item) => {
    const has = owned.get(item.key.slice(0, item.key.indexOf(':')))
    return has === undefined || has >= item.count ? [] : [{ name: item.name, needed: item.count, owned: has }]
  })
}
