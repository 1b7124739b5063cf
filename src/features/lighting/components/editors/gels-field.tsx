import { X } from 'lucide-react'
import type { LightGel } from '#shared/domain/lighting/schema.ts'
import { kelvinLabel, shifted, stackGels } from '#shared/domain/lighting/gel.ts'
import { IconButton } from '#src/ui/button.tsx'
import { Field } from '#src/ui/field.tsx'
import { Select } from '#src/ui/select.tsx'
import type { Kit } from '../../use-kit.ts'
import { How, type InputRow, Workings, stated } from '../readings/how.tsx'

const MOST = 6

type GelsFieldProps = { gels: readonly LightGel[]; kit: Kit; flashK: number; onChange: (gels: LightGel[]) => void }

/** The gels of a light: shifts add, transmissions multiply; what comes out stands below. */
export function GelsField({ gels, kit, flashK, onChange }: GelsFieldProps) {
  const stack = stackGels(gels.map((gel) => gel.numbers))
  const kelvin = shifted(flashK, stack.miredShift)
  const inputs = gels.flatMap((gel): InputRow[] => {
    const { miredShift, printedMired, transmission } = gel.numbers
    const printed = printedMired === null ? '' : `; printed ${printedMired > 0 ? '+' : ''}${printedMired}`
    return [
      [gel.name, `${miredShift.value > 0 ? '+' : ''}${miredShift.value} mired`, stated(miredShift) + printed],
      ['lets through', `${Math.round(transmission.value * 100)} %`, stated(transmission)],
    ]
  })
  return (
    <div>
      <Field label="Gels">
        <Select
          options={[
            { value: '', label: gels.length === 0 ? 'None; add a gel' : 'Add a gel' },
            ...kit.gels.map((gel) => ({ value: String(gel.kitId), label: gel.name })),
          ]}
          value=""
          disabled={gels.length >= MOST}
          onChange={(kitId) => {
            const gel = kit.gels.find((candidate) => candidate.kitId === kitId)
            if (gel) onChange([...gels, gel])
          }}
        />
      </Field>
      {gels.length > 0 && (
        <ul className="mt-1.5 flex flex-col">
          {gels.map((gel, index) => {
            const newest = kit.gels.find(
              (candidate) => candidate.kitId === gel.kitId && candidate.version > gel.version,
            )
            return (
              <li key={`${gel.kitId}-${index}`} className="flex items-center gap-2 border-t border-hair-soft text-sm">
                <span className="min-w-0 flex-1">{gel.name}</span>
                {newest && (
                  <button
                    type="button"
                    className="text-xs text-glow-ink underline max-md:min-h-11"
                    onClick={() => onChange(gels.map((other, at) => (at === index ? newest : other)))}
                  >
                    Take over the new numbers
                  </button>
                )}
                <IconButton
                  label={`Take off ${gel.name}`}
                  className="!size-7 max-md:!size-11"
                  onClick={() => onChange(gels.filter((_, at) => at !== index))}
                >
                  <X size={14} aria-hidden />
                </IconButton>
              </li>
            )
          })}
          <li className="flex items-baseline justify-between border-t border-hair-soft pt-1.5 text-sm">
            <span className="text-ink-soft">Colour of the light</span>
            <How
              label="Colour of the light"
              value={kelvin === null ? 'bluer than any colour temperature' : kelvinLabel(kelvin)}
            >
              <Workings
                formula="10⁶ / (10⁶ / T + shifts)"
                inputs={[['Flash, T', `${flashK} K`], ...inputs, ['Light lost', `${stack.lossStops.toFixed(1)} stops`]]}
                note="Positive mired is warmer. Where makers print the shift of their nominal conversion, the one from the gel’s own spectrum is used."
              />
            </How>
          </li>
        </ul>
      )}
    </div>
  )
}
