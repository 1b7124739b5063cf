import { type FormEvent, useId, useState } from 'react'
import { toRecipe } from '#shared/domain/recipes/recipe.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { saveRecipe } from '#src/lib/recipe-file.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { Button } from '#src/ui/button.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { Field } from '#src/ui/field.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { Input } from '#src/ui/input.tsx'
import { toast } from '#src/ui/toast.ts'
import { useKeepRecipe } from '../../mutations.ts'

export type KeepRecipeProps = { whole: WholeSetup; open: boolean; onOpenChange: (open: boolean) => void }

/** Keeps a setup as a recipe of the studio, under a name. Who does not belong to the studio can save it as a file. */
export function KeepRecipe({ whole, open, onOpenChange }: KeepRecipeProps) {
  const { inStudio } = useShoot()
  const keep = useKeepRecipe()
  const form = useId()
  const [name, setName] = useState(whole.setup.name)
  const [missing, setMissing] = useState('')
  function handleSubmit(event: FormEvent) {
    event.preventDefault()
    if (keep.isPending) return
    const words = name.trim()
    setMissing(words === '' ? 'Give it a name to find it by.' : '')
    if (words === '') return
    keep.mutate(
      { ...toRecipe(whole), name: words },
      {
        onSuccess: () => {
          onOpenChange(false)
          toast.say(`“${words}” is kept in the studio’s recipes.`)
        },
      },
    )
  }
  const save = (
    <Button
      onClick={() => {
        saveRecipe(toRecipe(whole))
        if (!inStudio) onOpenChange(false)
      }}
    >
      Save as JSON
    </Button>
  )
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title="Keep as a recipe"
      description={
        inStudio
          ? 'Camera, lights, places and set with their numbers, without sitters and looks. Every shoot of the studio can use it.'
          : 'Recipes are kept by people of the studio. As a file you can take this setup anywhere.'
      }
      footer={
        inStudio ? (
          <>
            {save}
            <Button type="submit" form={form} variant="primary" busy={keep.isPending}>
              Keep it
            </Button>
          </>
        ) : (
          save
        )
      }
    >
      {inStudio && (
        <form id={form} noValidate className="flex flex-col gap-3" onSubmit={handleSubmit}>
          <FormError>{keep.error?.message ?? null}</FormError>
          <Field label="Name" error={missing}>
            <Input maxLength={80} autoComplete="off" value={name} onChange={(event) => setName(event.target.value)} />
          </Field>
        </form>
      )}
    </Dialog>
  )
}
