import { useMemo } from 'react'
import { purposeWord } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { count, today } from '#src/lib/format.ts'
import { useMayWrite } from '#src/realtime/shoot-realtime.tsx'
import { usePlan } from '#src/realtime/use-plan.ts'
import { Button } from '#src/ui/button.tsx'
import { Caution } from '#src/ui/caution.tsx'
import { newerNumbersOf } from '../../newer-numbers.ts'
import type { Kit } from '../../use-kit.ts'
import type { SetupWriter } from '../../use-setup-writer.ts'

type NewerNumbersProps = { whole: WholeSetup; kit: Kit; writer: SetupWriter }

/** Offers what the kit room says newer of a setup's lights, as one step of undo; shoots that are past keep theirs. */
export function NewerNumbers({ whole, kit, writer }: NewerNumbersProps) {
  const mayWrite = useMayWrite('lighting')
  const { date } = usePlan().brief
  const newer = useMemo(() => newerNumbersOf(whole, kit), [whole, kit])
  const isPast = date !== null && date < today()
  if (newer.length === 0 || !mayWrite || isPast) return null

  return (
    <Caution
      title={`${count(newer.length, 'light has', 'lights have')} newer numbers in the kit room`}
      className="mb-3 flex flex-col items-start gap-2"
    >
      <ul className="text-xs max-md:text-[0.8125rem]">
        {newer.map(({ light, words }) => (
          <li key={light.id}>
            {purposeWord(light.purpose)}
            {light.group === null ? '' : ` ${light.group}`}: {words.join(', ')}
          </li>
        ))}
      </ul>
      <Button
        size="small"
        onClick={() => writer.patchLights(newer.map(({ light, patch }) => ({ id: light.id, patch })))}
      >
        Take them over
      </Button>
    </Caution>
  )
}
