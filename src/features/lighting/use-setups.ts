import { useNavigate } from 'react-router-dom'
import { mirrored } from '#shared/domain/lighting/mirror.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { fromRecipe } from '#shared/domain/recipes/recipe.ts'
import type { Recipe } from '#shared/domain/recipes/schema.ts'
import { appendKey } from '#shared/realtime/order-keys.ts'
import { newId } from '#src/lib/new-id.ts'
import { useDoc, useShoot } from '#src/realtime/shoot-realtime.tsx'
import { usePlan } from '#src/realtime/use-plan.ts'
import { useUndo } from '#src/realtime/use-undo.ts'
import { toast } from '#src/ui/toast.ts'
import { copyOf, newSetup } from './new-items.ts'
import { putSetup, removeSetup, restoreSetup, rewriteSetup } from './write-setups.ts'

/** Longest name that still leaves room for a number. */
const NAME_LENGTH = 76

export type SetupActions = {
  add(): void
  duplicate(whole: WholeSetup): void
  /** Left to right, where it stands. */
  mirror(whole: WholeSetup): void
  /** Left to right, as a setup of its own. */
  duplicateMirrored(whole: WholeSetup): void
  remove(whole: WholeSetup): void
  /** A new setup by a recipe. */
  byRecipe(recipe: Recipe): void
}

/** What is done with setups as a whole; each is one step of undo. */
export function useSetups(): SetupActions {
  const plan = usePlan()
  const shoot = useShoot()
  const doc = useDoc('lighting')
  const { stop } = useUndo(['lighting'])
  const navigate = useNavigate()
  const all = [...plan.setups.values()]
  const ranks = all.map((whole) => whole.setup.rank)

  function freeName(wanted: string): string {
    const names = new Set<string>(all.map((whole) => whole.setup.name))
    if (!names.has(wanted)) return wanted
    for (let number = 2; ; number++) if (!names.has(`${wanted} ${number}`)) return `${wanted} ${number}`
  }
  function step(write: () => void) {
    stop()
    write()
    stop()
  }
  function putCopy(whole: WholeSetup, name: string) {
    const copy = copyOf(whole, freeName(name.slice(0, NAME_LENGTH)), ranks, Math.random)
    step(() => putSetup(doc, copy))
    toast.say(`“${copy.setup.name}” is a setup of its own now.`, {
      label: 'Look at it',
      onPress: () => void navigate(`/shoots/${shoot.id}/lighting/${copy.setup.id}`),
    })
  }
  return {
    add() {
      const { setup, place } = newSetup(freeName(`Setup ${all.length + 1}`), ranks, Math.random)
      step(() => putSetup(doc, { setup, places: [place], lights: [], props: [] }))
      void navigate(`/shoots/${shoot.id}/lighting/${setup.id}`)
    },
    duplicate: (whole) => putCopy(whole, `${whole.setup.name}, variation`),
    duplicateMirrored: (whole) => putCopy(mirrored(whole), `${whole.setup.name}, mirrored`),
    mirror(whole) {
      step(() => rewriteSetup(doc, mirrored(whole)))
      toast.say(`“${whole.setup.name}” is mirrored, left to right.`)
    },
    byRecipe(recipe) {
      const rank = appendKey(ranks, Math.random)
      const made = fromRecipe(recipe, { newId, rank, name: freeName(recipe.name.slice(0, NAME_LENGTH)) })
      step(() => putSetup(doc, made))
      void navigate(`/shoots/${shoot.id}/lighting/${made.setup.id}`)
    },
    remove(whole) {
      step(() => removeSetup(doc, whole))
      toast.say(`“${whole.setup.name}” is removed.`, {
        label: 'Undo',
        onPress: () => step(() => restoreSetup(doc, whole)),
      })
    },
  }
}

/** The same three lines in every menu of a setup. */
export function wholeItems(whole: WholeSetup, actions: SetupActions): { label: string; onSelect: () => void }[] {
  return [
    { label: 'Duplicate as a variation', onSelect: () => actions.duplicate(whole) },
    { label: 'Mirror, left to right', onSelect: () => actions.mirror(whole) },
    { label: 'Duplicate mirrored', onSelect: () => actions.duplicateMirrored(whole) },
  ]
}
