import { useState } from 'react'
import type { SitterPrivates } from '#shared/api/private.ts'
import type { Look, Sitter } from '#shared/domain/looks/schema.ts'
import { type Patch, patchItem, removeItems } from '#shared/realtime/collection.ts'
import { looks, sitters } from '#shared/realtime/documents.ts'
import { useDoc, useShoot } from '#src/realtime/shoot-realtime.tsx'
import { count } from '#src/lib/format.ts'
import { Caution } from '#src/ui/caution.tsx'
import { Checkbox } from '#src/ui/checkbox.tsx'
import { Confirm } from '#src/ui/confirm.tsx'
import { Field } from '#src/ui/field.tsx'
import { Input } from '#src/ui/input.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { toast } from '#src/ui/toast.ts'
import { useSaveSizes } from '../mutations.ts'
import { clockOf, minutesOf, sitterLine, sitterTitle } from '../words.ts'
import { copySitter, putBack } from '../write-looks.ts'
import { MoreMenu } from './more-menu.tsx'
import { Panel, PanelSection } from '#src/ui/panel.tsx'
import { TextLine } from '#src/ui/text-line.tsx'

export type SitterPanelProps = {
  sitter: Sitter
  theirLooks: readonly Look[]
  /** Absent for who may not see sizes. */
  sizes: SitterPrivates | undefined
  mayWrite: boolean
  onClose: () => void
  onOpen: (sitterId: string) => void
}

const WHOLE_DAY: [number, number] = [540, 1080]

/** A person in front of the camera: who, whom they play, when they are here. */
export function SitterPanel({ sitter, theirLooks, sizes, mayWrite, onClose, onOpen }: SitterPanelProps) {
  const doc = useDoc('looks')
  const [isRemoving, setIsRemoving] = useState(false)
  const patch = (change: Patch<typeof sitters>) => patchItem(doc, sitters, sitter.id, change)
  const { hours } = sitter

  function remove() {
    const lookIds = theirLooks.map(({ id }) => id)
    const now = Date.now()
    removeItems(doc, looks, lookIds, now)
    removeItems(doc, sitters, [sitter.id], now)
    onClose()
    toast.say(`${sitter.name} is taken out.`, {
      label: 'Put them back',
      onPress: () => {
        putBack(doc, sitters, [sitter.id])
        putBack(doc, looks, lookIds)
      },
    })
  }

  return (
    <Panel
      className="sticky top-0 h-dvh w-[23rem]"
      title={sitterTitle(sitter)}
      onClose={onClose}
      aside={
        mayWrite && (
          <MoreMenu
            label="More about this sitter"
            items={[
              {
                label: 'Make a second one with the same looks',
                onSelect: () => onOpen(copySitter(doc, sitter, theirLooks)),
              },
              'line',
              {
                label: 'Take them out',
                danger: true,
                onSelect: () => (theirLooks.length > 0 ? setIsRemoving(true) : remove()),
              },
            ]}
          />
        )
      }
    >
      {sitter.underAge && (
        <Caution title="Under age">
          Child-performance law sets hours, breaks, schooling, a chaperone and often a licence, and it differs from
          place to place. Ask the local authority before the call is fixed; Sconce does not check it.
        </Caution>
      )}
      <div className="grid grid-cols-2 gap-3">
        <TextLine
          required
          label="Name"
          value={sitter.name}
          maxLength={80}
          readOnly={!mayWrite}
          onChange={(name) => patch({ name })}
        />
        <TextLine
          label="Plays"
          value={sitter.character}
          maxLength={80}
          readOnly={!mayWrite}
          placeholder="The Astronomer"
          onChange={(character) => patch({ character })}
        />
      </div>
      {mayWrite ? (
        <div>
          <Checkbox checked={hours === null} onChange={(isWhole) => patch({ hours: isWhole ? null : WHOLE_DAY })}>
            Here the whole day
          </Checkbox>
          {hours !== null && (
            <div className="mt-1 grid grid-cols-2 gap-3">
              <Field label="Here from">
                <Input
                  type="time"
                  value={clockOf(hours[0])}
                  onChange={(event) => patchHours(minutesOf(event.target.value), hours[1])}
                />
              </Field>
              <Field label="To" error={hours[1] <= hours[0] ? 'This is before the beginning.' : undefined}>
                <Input
                  type="time"
                  value={clockOf(hours[1])}
                  onChange={(event) => patchHours(hours[0], minutesOf(event.target.value))}
                />
              </Field>
            </div>
          )}
        </div>
      ) : (
        <p>{sitterLine(sitter)}</p>
      )}
      <div className="grid grid-cols-2 gap-3">
        <Field label="Hair and make-up" hint={mayWrite ? 'For the first look, and again when they differ.' : ''}>
          <NumberInput
            value={sitter.chairMin}
            unit="min"
            min={0}
            max={360}
            readOnly={!mayWrite}
            onChange={(chairMin) => patch({ chairMin })}
          />
        </Field>
        <Field label="Travel to the place" hint={mayWrite ? 'For their call.' : ''}>
          <NumberInput
            value={sitter.travelMin}
            unit="min"
            min={0}
            max={720}
            readOnly={!mayWrite}
            onChange={(travelMin) => patch({ travelMin })}
          />
        </Field>
      </div>
      <Checkbox checked={sitter.underAge} disabled={!mayWrite} onChange={(underAge) => patch({ underAge })}>
        Under age
      </Checkbox>
      {sizes && <Sizes sitterId={sitter.id} sizes={sizes} />}
      <Confirm
        open={isRemoving}
        onOpenChange={setIsRemoving}
        title={`Take ${sitter.name} out?`}
        action="Take them out"
        keep="Keep them"
        onConfirm={remove}
      >
        {count(theirLooks.length, 'look')} on their rail come down too. The pieces stay in the list, and what the client
        signed stays on record.
      </Confirm>
    </Panel>
  )

  function patchHours(fromMin: number | null, toMin: number | null) {
    if (fromMin !== null && toMin !== null) patch({ hours: [fromMin, toMin] })
  }
}

function Sizes({ sitterId, sizes }: { sitterId: string; sizes: SitterPrivates }) {
  const shoot = useShoot()
  const save = useSaveSizes(shoot.id)
  const own = sizes.sitters.find((one) => one.sitterId === sitterId) ?? { sizes: '', contact: '' }
  const give = (change: { sizes?: string; contact?: string }) =>
    save.mutate({ sitterId, sizes: own.sizes, contact: own.contact, ...change })
  return (
    <PanelSection title="For photographer and stylist only">
      <TextLine
        prose
        label="Sizes"
        value={own.sizes}
        maxLength={1000}
        placeholder="Height, chest, collar, shoe"
        onChange={(next) => give({ sizes: next })}
      />
      <TextLine label="Contact" value={own.contact} maxLength={300} onChange={(contact) => give({ contact })} />
    </PanelSection>
  )
}
