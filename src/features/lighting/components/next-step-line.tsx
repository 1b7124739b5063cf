import type { LightPurpose } from '#shared/domain/lighting/schema.ts'
import { purposeWord } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { Button } from '#src/ui/button.tsx'
import { nextStep } from '../next-step.ts'

type NextStepLineProps = { whole: WholeSetup; onAddLight: (purpose: LightPurpose) => void; onAddPanel: () => void }

/** What is usually built next, in one line. Nothing once there is one of each. */
export function NextStepLine({ whole, onAddLight, onAddPanel }: NextStepLineProps) {
  const step = nextStep(whole)
  if (!step) return null
  return (
    <div className="flex flex-wrap items-center gap-x-2.5 gap-y-1 text-sm text-ink-soft">
      <p className="min-w-0 flex-1 basis-48 max-md:basis-full">{step.words}</p>
      <Button size="small" onClick={() => onAddLight(step.purpose)}>
        Add the {purposeWord(step.purpose).toLowerCase()}
      </Button>
      {step.orPanel && (
        <Button size="small" onClick={onAddPanel}>
          Add a panel
        </Button>
      )}
    </div>
  )
}
