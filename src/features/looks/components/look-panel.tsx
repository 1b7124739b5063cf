import { Link } from 'react-router-dom'
import type { Look, Piece, Sitter } from '#shared/domain/looks/schema.ts'
import type { Plan, PlannedLook } from '#shared/domain/plan/read-plan.ts'
import { type SignOffState, signOffLamp, signOffWords } from '#shared/domain/sign-off/state.ts'
import { type Patch, patchItem, removeItems } from '#shared/realtime/collection.ts'
import { looks } from '#shared/realtime/documents.ts'
import { useDoc, useShoot } from '#src/realtime/shoot-realtime.tsx'
import { Field } from '#src/ui/field.tsx'
import { Lamp } from '#src/ui/lamp.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import { toast } from '#src/ui/toast.ts'
import { sitterTitle } from '../words.ts'
import { copyLook, putBack } from '../write-looks.ts'
import { LookPictures } from './look-pictures.tsx'
import { LookPieces } from './look-pieces.tsx'
import { MoreMenu } from './more-menu.tsx'
import { Panel, PanelSection } from '#src/ui/panel.tsx'
import { TextLine } from '#src/ui/text-line.tsx'

export type LookPanelProps = {
  planned: PlannedLook
  plan: Plan
  state: SignOffState
  sitters: readonly Sitter[]
  pieces: ReadonlyMap<string, Piece>
  mayWrite: boolean
  onClose: () => void
  onOpenLook: (lookId: string) => void
  onOpenPiece: (pieceId: string) => void
}

/** Everything about one look. Who only reads sees it the same way, without the controls. */
export function LookPanel({
  planned,
  plan,
  state,
  sitters,
  pieces,
  mayWrite,
  onClose,
  onOpenLook,
  onOpenPiece,
}: LookPanelProps) {
  const doc = useDoc('looks')
  const shoot = useShoot()
  const { look, sitter } = planned
  const patch = (change: Patch<typeof looks>) => patchItem(doc, looks, look.id, change)
  const alternatives = [...plan.looks.values()].filter(
    (other) => other.look.id !== look.id && other.look.sitterId === look.sitterId,
  )

  function takeDown() {
    removeItems(doc, looks, [look.id], Date.now())
    onClose()
    toast.say(`“${look.name}” is taken down. Its pieces stay in the list.`, {
      label: 'Put it back',
      onPress: () => putBack(doc, looks, [look.id]),
    })
  }

  return (
    <Panel
      className="sticky top-0 h-dvh w-[23rem]"
      title={look.name}
      onClose={onClose}
      aside={
        mayWrite && (
          <MoreMenu
            label="More about this look"
            items={[
              { label: 'Make a second version', onSelect: () => onOpenLook(copyLook(doc, look)) },
              'line',
              { label: 'Take it down', danger: true, onSelect: takeDown },
            ]}
          />
        )
      }
    >
      <p className="flex items-center gap-2 text-sm text-ink-soft">
        <Lamp state={signOffLamp(state)} />
        {signOffWords(state)}
        <span className="flex-1" />
        <Link
          to={`/shoots/${shoot.id}/sign-off?look=${look.id}`}
          className="underline underline-offset-2 hover:text-ink"
        >
          Sign-off
        </Link>
      </p>
      <LookPictures look={look} mayWrite={mayWrite} />
      <PanelSection title="Pieces">
        <LookPieces planned={planned} all={pieces} mayWrite={mayWrite} onOpen={onOpenPiece} />
      </PanelSection>
      <PanelSection title="The look">
        <TextLine
          required
          label="Name"
          value={look.name}
          maxLength={80}
          readOnly={!mayWrite}
          onChange={(name) => patch({ name })}
        />
        <div className="grid grid-cols-2 gap-3">
          <Field label="On">
            <Select
              disabled={!mayWrite}
              value={String(look.sitterId)}
              options={[
                ...(sitter ? [] : [{ value: String(look.sitterId), label: 'Nobody yet' }]),
                ...sitters.map((one) => ({ value: String(one.id), label: sitterTitle(one) })),
              ]}
              onChange={(id) => {
                const chosen = sitters.find((one) => one.id === id)
                if (chosen) patch({ sitterId: chosen.id })
              }}
            />
          </Field>
          <Field label="To change into it">
            <NumberInput
              value={look.changeMin}
              unit="min"
              min={0}
              max={240}
              readOnly={!mayWrite}
              onChange={(changeMin) => patch({ changeMin })}
            />
          </Field>
        </div>
        <TextLine
          label="Hair"
          value={look.hair}
          maxLength={300}
          readOnly={!mayWrite}
          onChange={(hair) => patch({ hair })}
        />
        <TextLine
          label="Make-up"
          value={look.makeUp}
          maxLength={300}
          readOnly={!mayWrite}
          onChange={(makeUp) => patch({ makeUp })}
        />
        <TextLine
          prose
          label="Note"
          value={look.note}
          maxLength={2000}
          readOnly={!mayWrite}
          onChange={(note) => patch({ note })}
        />
        <Alternative
          look={look}
          options={alternatives}
          mayWrite={mayWrite}
          onChange={(alternativeOf) => patch({ alternativeOf })}
        />
      </PanelSection>
    </Panel>
  )
}

type AlternativeProps = {
  look: Look
  options: readonly PlannedLook[]
  mayWrite: boolean
  onChange: (lookId: Look['id'] | null) => void
}

function Alternative({ look, options, mayWrite, onChange }: AlternativeProps) {
  if (options.length === 0) return null
  return (
    <Field label="An alternative to">
      <Select
        disabled={!mayWrite}
        value={look.alternativeOf ?? ''}
        options={[
          { value: '', label: 'Nothing: a look of its own' },
          ...options.map(({ look: other }) => ({ value: String(other.id), label: other.name })),
        ]}
        onChange={(id) => onChange(options.find(({ look: other }) => other.id === id)?.look.id ?? null)}
      />
    </Field>
  )
}
