import { type FormEvent, useState } from 'react'
import { Button } from '#src/ui/button.tsx'
import { Field } from '#src/ui/field.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { Input } from '#src/ui/input.tsx'
import { useCreateStudio } from '../mutations.ts'

/** The first thing a new person does: name the place they work from. */
export function NameStudio() {
  const [name, setName] = useState('')
  const [missing, setMissing] = useState(false)
  const create = useCreateStudio()
  const handleSubmit = (event: FormEvent) => {
    event.preventDefault()
    setMissing(name.trim() === '')
    if (name.trim() !== '') create.mutate(name.trim())
  }
  return (
    <form
      noValidate
      onSubmit={handleSubmit}
      className="mx-auto mt-6 max-w-xl rounded-r border border-hair bg-paper px-5 py-6 md:mt-10 md:px-9 md:py-8"
    >
      <h2 className="text-2xl">Name your studio</h2>
      <p className="mt-2 mb-5 text-ink-soft">
        A studio holds your shoots, the people you work with and the kit you light with. You can invite others into it
        later, or keep it to yourself.
      </p>
      <FormError>{create.error ? create.error.message : null}</FormError>
      <div className="mt-2 flex flex-col gap-3 sm:flex-row sm:items-end">
        <Field label="Name of the studio" error={missing ? 'Give it a name' : undefined} className="flex-1">
          <Input
            autoComplete="organization"
            maxLength={80}
            value={name}
            onChange={(event) => setName(event.target.value)}
          />
        </Field>
        <Button type="submit" variant="primary" busy={create.isPending}>
          Create the studio
        </Button>
      </div>
    </form>
  )
}
