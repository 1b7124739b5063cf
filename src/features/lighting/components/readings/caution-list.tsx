import type { Caution as CautionWords } from '#shared/domain/lighting/cautions.ts'
import { Caution } from '#src/ui/caution.tsx'
import { Popover } from '#src/ui/popover.tsx'

const TONES = { red: 'velvet', mind: 'glow', fine: 'bottle' } as const

/** What to mind, worst first; each opens to how it was worked out. */
export function CautionList({
  cautions,
  onChoose,
}: {
  cautions: readonly CautionWords[]
  onChoose: (key: string) => void
}) {
  if (cautions.length === 0) return null
  return (
    <ul aria-label="Cautions" className="mt-3.5 flex flex-col gap-2">
      {cautions.map((caution) => (
        <li key={caution.key}>
          <Caution tone={TONES[caution.tone]} title={caution.title}>
            {caution.words}{' '}
            <span className="whitespace-nowrap">
              <Popover
                label={`Why: ${caution.title}`}
                trigger={
                  <button
                    type="button"
                    className="text-ink-soft underline decoration-dotted underline-offset-2 hover:text-ink max-md:-my-2 max-md:inline-block max-md:px-1 max-md:py-2"
                    aria-label={`Why: ${caution.title}`}
                  >
                    Why
                  </button>
                }
              >
                <p className="text-sm">{caution.how}</p>
                {caution.lightId !== null && (
                  <button
                    type="button"
                    className="mt-2 text-sm text-draft underline"
                    onClick={() => caution.lightId !== null && onChoose(caution.lightId)}
                  >
                    Show this light
                  </button>
                )}
              </Popover>
            </span>
          </Caution>
        </li>
      ))}
    </ul>
  )
}
