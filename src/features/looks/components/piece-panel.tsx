import type { PieceCosts } from '#shared/api/private.ts'
import { PIECE_KINDS, PIECE_STATUSES, type Piece } from '#shared/domain/looks/schema.ts'
import type { Plan } from '#shared/domain/plan/read-plan.ts'
import { frames, looks, pieces } from '#shared/realtime/documents.ts'
import { type Patch, addMember, patchItem, removeItems, removeMember } from '#shared/realtime/collection.ts'
import { useDoc } from '#src/realtime/shoot-realtime.tsx'
import { useItems } from '#src/realtime/use-items.ts'
import { Caution } from '#src/ui/caution.tsx'
import { Checkbox } from '#src/ui/checkbox.tsx'
import { Field } from '#src/ui/field.tsx'
import { Input } from '#src/ui/input.tsx'
import { Select } from '#src/ui/select.tsx'
import { toast } from '#src/ui/toast.ts'
import { mergeWarning } from '../words.ts'
import { copyPiece, putBack } from '../write-looks.ts'
import { ColourField } from './colour-field.tsx'
import { MoreMenu } from './more-menu.tsx'
import { Panel, PanelSection } from '#src/ui/panel.tsx'
import { PieceCost } from './piece-cost.tsx'
import { TextLine } from '#src/ui/text-line.tsx'

export type PiecePanelProps = {
  piece: Piece
  plan: Plan
  /** Absent for who may not see cost and size. */
  costs: PieceCosts | undefined
  mayWrite: boolean
  onClose: () => void
  onOpen: (pieceId: string) => void
}

/** One garment, accessory or prop, and every look that wears it. */
export function PiecePanel({ piece, plan, costs, mayWrite, onClose, onOpen }: PiecePanelProps) {
  const doc = useDoc('looks')
  const boardFrames = useItems('board', frames)
  const patch = (change: Patch<typeof pieces>) => patchItem(doc, pieces, piece.id, change)
  const wearing = [...plan.looks.values()].filter(({ look }) => look.pieceIds.includes(piece.id))
  const pictures = new Set<string>(wearing.flatMap(({ look }) => look.pictureIds))
  const palette = [
    ...new Set(
      [...boardFrames.values()]
        .filter((frame) => pictures.has(frame.picture.uploadId))
        .flatMap((frame) => frame.palette),
    ),
  ].slice(0, 10)
  const merges = mergeWarning(piece, plan)

  function remove() {
    removeItems(doc, pieces, [piece.id], Date.now())
    onClose()
    toast.say(`“${piece.name}” is taken out of the wardrobe.`, {
      label: 'Put it back',
      onPress: () => putBack(doc, pieces, [piece.id]),
    })
  }

  return (
    <Panel
      className="sticky top-0 h-dvh w-[23rem]"
      title={piece.name}
      onClose={onClose}
      aside={
        mayWrite && (
          <MoreMenu
            label="More about this piece"
            items={[
              { label: 'Make a second one', onSelect: () => onOpen(copyPiece(doc, piece)) },
              'line',
              { label: 'Take it out', danger: true, onSelect: remove },
            ]}
          />
        )
      }
    >
      {merges && <Caution>{merges}. A rim, a lighter wall or another cloth sets it apart.</Caution>}
      <TextLine
        required
        label="Piece"
        value={piece.name}
        maxLength={120}
        readOnly={!mayWrite}
        onChange={(name) => patch({ name })}
        hint={mayWrite ? 'What it is, a comma, then what sets it apart: Gloves, grey wool.' : ''}
      />
      <div className="grid grid-cols-2 gap-3">
        <Field label="Kind">
          <Select
            disabled={!mayWrite}
            value={piece.kind}
            options={PIECE_KINDS.map((kind) => ({ value: kind, label: kind }))}
            onChange={(kind) => patch({ kind })}
          />
        </Field>
        <Field label="Status">
          <Select
            disabled={!mayWrite}
            value={piece.status}
            options={PIECE_STATUSES.map((status) => ({ value: status, label: status }))}
            onChange={(status) => patch({ status })}
          />
        </Field>
      </div>
      <ColourField value={piece.colour} from={palette} readOnly={!mayWrite} onChange={(colour) => patch({ colour })} />
      <div className="grid grid-cols-2 gap-3">
        <TextLine
          label="From"
          value={piece.source}
          maxLength={120}
          readOnly={!mayWrite}
          placeholder="Theatre hire"
          onChange={(source) => patch({ source })}
        />
        <Field label="Back by">
          <Input
            type="date"
            readOnly={!mayWrite}
            value={piece.dueBack ?? ''}
            onChange={(event) => patch({ dueBack: event.target.value === '' ? null : event.target.value })}
          />
        </Field>
      </div>
      <TextLine
        prose
        label="Note"
        value={piece.note}
        maxLength={1000}
        readOnly={!mayWrite}
        onChange={(note) => patch({ note })}
      />
      <PanelSection title="Worn in">
        {mayWrite ? (
          <div>
            {[...plan.looks.values()].map(({ look }) => (
              <Checkbox
                key={look.id}
                checked={look.pieceIds.includes(piece.id)}
                onChange={(isWorn) =>
                  isWorn
                    ? addMember(doc, looks, look.id, 'pieceIds', piece.id, Math.random)
                    : removeMember(doc, looks, look.id, 'pieceIds', piece.id)
                }
              >
                {look.name}
              </Checkbox>
            ))}
          </div>
        ) : (
          <p>{wearing.map(({ look }) => look.name).join(', ') || 'No look yet.'}</p>
        )}
      </PanelSection>
      {costs && <PieceCost pieceId={piece.id} costs={costs} />}
    </Panel>
  )
}
