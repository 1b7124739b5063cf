import { canInShoot } from '#shared/access/roles.ts'
import { count, longDate, shortInstant } from '#src/lib/format.ts'
import { useRole, useShoot } from '#src/realtime/shoot-realtime.tsx'
import { ScreenBar } from '#src/ui/screen-bar.tsx'
import { useBriefForm } from '../use-brief-form.ts'
import { BriefLine } from './brief-line.tsx'
import { Deliverables } from './deliverables.tsx'
import { RemoveShoot } from './remove-shoot.tsx'
import { Rooms } from './rooms.tsx'
import { ZoneLine } from './zone-line.tsx'

export type BriefScreenProps = { userId: string; onRemoved: () => void }

/** What the shoot is for, on one sheet of paper. */
export function BriefScreen({ userId, onRemoved }: BriefScreenProps) {
  const { id, brief } = useShoot()
  const role = useRole()
  const readOnly = !canInShoot(role, 'brief.write')
  const mayRemove = canInShoot(role, 'shoot.remove')
  const form = useBriefForm(brief, id, userId)
  const line = { form, readOnly }
  const pictures = brief.deliverables.reduce((sum, deliverable) => sum + deliverable.count, 0)
  return (
    <>
      <ScreenBar
        title="Brief"
        sub={
          readOnly
            ? 'The photographer writes it'
            : `${count(pictures, 'picture')} promised · every line is saved when you leave it`
        }
      />
      <div className="px-3 pt-3 pb-12 md:px-6 md:pt-0">
        <article
          aria-label="The brief"
          {...(readOnly ? { tabIndex: 0 } : {})}
          className="grid max-w-6xl rounded-r border border-hair bg-paper shadow-print lg:grid-cols-[minmax(0,1.45fr)_minmax(0,1fr)]"
        >
          <div className="flex flex-col gap-6 px-5 py-6 md:px-9 md:py-8">
            <BriefLine
              {...line}
              field="title"
              label="Title"
              textClass="font-display !text-3xl !leading-tight font-semibold"
            />
            <BriefLine
              {...line}
              field="client"
              label="Client"
              placeholder="Who the pictures are for"
              textClass="!text-lg"
              autoComplete="organization"
            />
            <BriefLine
              {...line}
              field="idea"
              label="The idea"
              kind="lines"
              placeholder="What the pictures should feel like, in a few lines"
              textClass="font-display italic !text-[1.1875rem] !leading-relaxed"
            />
            <Deliverables deliverables={brief.deliverables} readOnly={readOnly} shootId={id} />
            <BriefLine
              {...line}
              field="usage"
              label="Usage"
              kind="lines"
              placeholder="Where the pictures may be shown, for how long, by whom"
            />
          </div>
          <div className="flex flex-col gap-6 border-hair px-5 py-6 max-lg:border-t md:px-8 md:py-8 lg:border-l">
            <section className="flex flex-col gap-4">
              <h2 className="text-xl">When</h2>
              <BriefLine
                {...line}
                field="date"
                label="First day"
                kind="date"
                none="No date yet"
                shown={brief.date === null ? null : longDate(brief.date)}
                textClass="!text-lg"
              />
              <ZoneLine {...line} />
              <BriefLine
                {...line}
                field="signOffBy"
                label="Looks signed off by"
                kind="moment"
                none="No deadline"
                shown={brief.signOffByMs === null ? null : shortInstant(brief.signOffByMs, brief.zone)}
                {...(readOnly ? {} : { hint: 'On the clock where the shoot happens. The client sees it.' })}
              />
            </section>
            <section className="flex flex-col gap-4 border-t border-hair pt-5">
              <h2 className="text-xl">Where</h2>
              <BriefLine
                {...line}
                field="place"
                label="Place"
                none="No place yet"
                placeholder="Name of the location"
                textClass="!text-lg"
              />
              <BriefLine {...line} field="address" label="Address" kind="lines" autoComplete="street-address" />
              <BriefLine
                {...line}
                field="coordinates"
                label="Coordinates"
                placeholder="54.601, -3.134"
                {...(readOnly ? {} : { hint: 'Latitude, longitude. The sun is worked out from them.' })}
              />
              <div className="grid gap-4 sm:grid-cols-2">
                <BriefLine {...line} field="parking" label="Parking" kind="lines" />
                <BriefLine {...line} field="access" label="Getting in" kind="lines" />
              </div>
            </section>
            <Rooms rooms={brief.rooms} readOnly={readOnly} shootId={id} />
          </div>
        </article>
        {mayRemove && (
          <div className="mt-3">
            <RemoveShoot shootId={id} title={brief.title} onRemoved={onRemoved} />
          </div>
        )}
      </div>
    </>
  )
}
