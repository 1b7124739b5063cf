import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { MOST_SHEET_FRAMES, PAPERS, type Paper } from '#shared/api/recipes.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { LengthUnit } from '#shared/units/length.ts'
import { useLengthUnit } from '#src/lib/length-unit.ts'
import { Button } from '#src/ui/button.tsx'
import { Checkbox } from '#src/ui/checkbox.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { Field } from '#src/ui/field.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { Select } from '#src/ui/select.tsx'
import { Waiting } from '#src/ui/waiting.tsx'
import { useRecipeSheet } from '../../mutations.ts'
import { type SheetPicture, lightingQueries } from '../../queries.ts'

export type RecipeSheetDialogProps = {
  whole: WholeSetup
  /** The test frames of the setup; asked for when the dialog opens. */
  frames: () => Promise<SheetPicture[]>
  open: boolean
  onOpenChange: (open: boolean) => void
}

const PAPER_WORDS: Readonly<Record<Paper, string>> = { A4: 'A4', Letter: 'US Letter' }
const UNITS: readonly { value: LengthUnit; label: string }[] = [
  { value: 'm', label: 'Metres' },
  { value: 'ft', label: 'Feet and inches' },
]

/** Chooses paper, unit and pictures, and saves the recipe sheet of a setup as PDF. */
export function RecipeSheetDialog({ whole, frames, open, onOpenChange }: RecipeSheetDialogProps) {
  const own = useLengthUnit()
  const sheet = useRecipeSheet()
  const [paper, setPaper] = useState<Paper>(() => (own === 'ft' ? 'Letter' : 'A4'))
  const [unit, setUnit] = useState<LengthUnit>(own)
  const [left, setLeft] = useState<ReadonlySet<number>>(new Set())
  const pictures = useQuery({ ...lightingQueries.sheetPictures(whole.setup.id, frames), enabled: open })
  const all = (pictures.data ?? []).slice(0, MOST_SHEET_FRAMES)
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title="Recipe sheet"
      description={`“${whole.setup.name}” on paper: plan and side to scale, lights, readings, kit and cautions.`}
      footer={
        <Button
          variant="primary"
          busy={sheet.isPending}
          disabled={pictures.isLoading}
          onClick={() =>
            sheet.mutate(
              { whole, paper, unit, pictures: all.filter((_, index) => !left.has(index)) },
              { onSuccess: () => onOpenChange(false) },
            )
          }
        >
          Save the PDF
        </Button>
      }
    >
      <FormError>{sheet.error?.message ?? null}</FormError>
      <div className="grid grid-cols-2 gap-3">
        <Field label="Paper">
          <Select
            value={paper}
            onChange={setPaper}
            options={PAPERS.map((value) => ({ value, label: PAPER_WORDS[value] }))}
          />
        </Field>
        <Field label="Lengths">
          <Select value={unit} onChange={setUnit} options={UNITS} />
        </Field>
      </div>
      {pictures.isLoading && <Waiting />}
      {pictures.isError && (
        <p className="mt-3 text-sm text-ink-soft">The test frames are not there; the sheet is made without them.</p>
      )}
      {all.length > 0 && (
        <fieldset className="mt-4">
          <legend className="label-small">Test frames</legend>
          {all.map(({ caption }, index) => (
            <Checkbox
              key={index}
              checked={!left.has(index)}
              onChange={(isIn) => {
                const next = new Set(left)
                if (isIn) next.delete(index)
                else next.add(index)
                setLeft(next)
              }}
            >
              {caption}
            </Checkbox>
          ))}
        </fieldset>
      )}
    </Dialog>
  )
}
