import { KIT_LIST_KINDS, type KitListKind, kitListOf, missingFrom } from '#shared/domain/lighting/kit-list.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { Caution } from '#src/ui/caution.tsx'
import type { Kit } from '../use-kit.ts'

const TITLES: Readonly<Record<KitListKind, string>> = {
  camera: 'Camera',
  unit: 'Flash heads and lamps',
  modifier: 'Modifiers',
  gel: 'Gels',
  support: 'Supports',
  set: 'Panels, flags and the set',
}

type BringListProps = { setups: readonly WholeSetup[]; kit: Kit }

/** What the shots' setups need together, and of what the studio has too few. */
export function BringList({ setups, kit }: BringListProps) {
  const items = kitListOf(setups)
  const missing = kit.state === 'there' ? missingFrom(setups, kit.quantities) : []
  return (
    <section aria-labelledby="what-to-bring" className="border-t border-hair px-[18px] py-4 md:px-6 md:pb-8">
      <h2 id="what-to-bring" className="text-[1.1875rem]">
        What to bring
      </h2>
      <p className="mb-3 text-sm text-ink-soft">
        For the setups that shots use. Each thing as often as the setup that needs most of it; spares and batteries are
        yours to add.
      </p>
      {missing.length > 0 && (
        <div className="mb-3 max-w-[42rem]">
          <Caution tone="glow" title="Too few in the kit room">
            {missing.map(({ name, needed, owned }) => `${name}: ${needed} needed, ${owned} there`).join('; ')}. Borrow
            or hire them, or use another light.
          </Caution>
        </div>
      )}
      <div className="columns-1 gap-8 sm:columns-2 xl:columns-3">
        {KIT_LIST_KINDS.filter((kind) => items.some((item) => item.kind === kind)).map((kind) => (
          <div key={kind} className="mb-4 break-inside-avoid">
            <h3 className="label-small mb-0.5">{TITLES[kind]}</h3>
            <ul className="text-sm">
              {items
                .filter((item) => item.kind === kind)
                .map((item) => (
                  <li key={item.key} className="flex gap-2 border-t border-hair-soft py-1.5">
                    <span className="w-7 flex-none text-right tabular-nums">{item.count} ×</span>
                    <span className="min-w-0 flex-1">
                      {item.name}
                      {item.setups.length < setups.length && (
                        <span className="block text-xs text-ink-soft">{item.setups.join(', ')}</span>
                      )}
                    </span>
                  </li>
                ))}
            </ul>
          </div>
        ))}
      </div>
    </section>
  )
}
