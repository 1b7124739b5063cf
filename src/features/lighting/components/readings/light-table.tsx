import type { ReactNode } from 'react'
import type { LightId } from '#shared/ids.ts'
import type { SetupReading } from '#shared/domain/lighting/readings.ts'
import { inSentence } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { lightNames } from '#shared/domain/recipes/sheet.ts'
import { cn } from '#src/lib/cn.ts'
import { listed, provenanceOf } from '../../reading-words.ts'
import { type LightOfTable, LightRow, PanelRow, ROW, TotalRow } from './light-rows.tsx'

type LightTableProps = {
  whole: WholeSetup
  reading: SetupReading
  chosenKey: string | null
  onChoose: (key: string) => void
  /** Left out for those who only read. */
  onSwitch?: ((id: LightId, isOn: boolean) => void) | undefined
  /** At the end of the title's line. */
  aside?: ReactNode
}

/** Each light with what it gives, and panels with what they give back. */
export function LightTable({ whole, reading, chosenKey, onChoose, onSwitch, aside }: LightTableProps) {
  const names = lightNames(whole.lights)
  const rows = whole.lights.flatMap((light, index): LightOfTable[] => {
    const own = reading.lights.find((entry) => entry.lightId === light.id)
    return own ? [{ light, own, name: names[index] ?? '' }] : []
  })
  const atSitter = rows.filter(({ own }) => own.where === 'sitter')
  const onWall = rows.filter(({ own }) => own.where === 'wall')
  const panels = reading.panels.filter((panel) => panel.fNumber > 0)
  const row = (entry: LightOfTable) => (
    <LightRow
      key={entry.light.id}
      {...entry}
      whole={whole}
      reading={reading}
      chosen={chosenKey === entry.light.id}
      onChoose={onChoose}
      onSwitch={onSwitch}
    />
  )
  const guessed = rows.filter(({ light, own }) => own.isOn && provenanceOf(light, own) === 'assumed')
  return (
    <>
      {(atSitter.length > 0 || panels.length > 0) && (
        <section aria-labelledby="at-the-sitter">
          <div className="mb-1 flex min-h-8 items-center justify-between gap-3">
            <h2 id="at-the-sitter" className="text-[1.1875rem]">
              At the sitter
            </h2>
            {aside}
          </div>
          <div role="table" aria-labelledby="at-the-sitter" className="text-sm">
            <Head />
            {atSitter.map(row)}
            {panels.map((panel) => (
              <PanelRow
                key={panel.propId}
                panel={panel}
                whole={whole}
                reading={reading}
                chosen={chosenKey === panel.propId}
                onChoose={onChoose}
              />
            ))}
            <TotalRow whole={whole} reading={reading} />
          </div>
        </section>
      )}
      {onWall.length > 0 && (
        <section aria-labelledby="on-the-wall" className="mt-3">
          <h2 id="on-the-wall" className="mb-1 text-[1.1875rem]">
            On the wall
          </h2>
          <div role="table" aria-labelledby="on-the-wall" className="text-sm">
            <Head hidden />
            {onWall.map(row)}
          </div>
        </section>
      )}
      {guessed.length > 0 && (
        <p className="mt-1.5 text-xs text-ink-soft">
          Assumed numbers in {listed(guessed.map(({ name }) => inSentence(name)))}: a meter reading takes their place.
        </p>
      )}
    </>
  )
}

function Head({ hidden = false }: { hidden?: boolean }) {
  return (
    <div role="rowgroup" className={hidden ? 'sr-only' : ''}>
      <div role="row" className={cn(ROW, 'pb-1.5 text-xs font-semibold whitespace-nowrap text-ink-soft')}>
        <span role="columnheader">
          <span className="sr-only">Group</span>
        </span>
        <span role="columnheader">Light</span>
        <span role="columnheader" className="text-right">
          Power
        </span>
        <span role="columnheader" className="text-right">
          Reads
        </span>
        <span role="columnheader" className="text-right">
          vs main
        </span>
        <span role="columnheader">
          <span className="sr-only">On or off</span>
        </span>
      </div>
    </div>
  )
}
