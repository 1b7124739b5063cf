import { bottomOf, rightOf } from '#shared/domain/board/geometry.ts'
import { arrangeNew } from '#shared/domain/board/arrange.ts'
import { FRAME_RIGHTS, type Frame } from '#shared/domain/board/schema.ts'
import { patchItem } from '#shared/realtime/collection.ts'
import { frames, shots } from '#shared/realtime/documents.ts'
import { Button } from '#src/ui/button.tsx'
import { useBoardPlan } from '../../board-plan.ts'
import { goTo } from '../../gestures/view-moves.ts'
import { announce, asStep, useWall } from '../../wall-control.ts'
import { select } from '../../wall-state.ts'
import { lookLabel } from '../../words.ts'
import { addPalette } from '../../write-board.ts'
import { PictureTrouble } from '../picture-trouble.tsx'
import { ColourCompare } from './colour-compare.tsx'
import { FrameComments } from './comments.tsx'
import { ChoiceRow, Row, TextRow } from './row.tsx'
import { SwatchStrip } from './swatch-strip.tsx'

const RIGHTS_WORDS: Readonly<Record<(typeof FRAME_RIGHTS)[number], string>> = {
  reference: 'Reference only',
  ours: 'Ours',
  licensed: 'Licensed',
  unknown: 'Unknown',
}

export function FrameInspector({ frame, mayWrite }: { frame: Frame; mayWrite: boolean }) {
  const control = useWall()
  const { doc } = control
  const plan = useBoardPlan()
  const write = (patch: Parameters<typeof patchItem<typeof frames>>[3]) => patchItem(doc, frames, frame.id, patch)
  const looks = [
    { value: '', label: 'No look' },
    ...[...plan.looks.values()].map((look) => ({ value: String(look.look.id), label: lookLabel(look) })),
  ]
  const allShots = [...plan.shots.values()].sort((a, b) => (a.number ?? 9999) - (b.number ?? 9999))
  const shotOptions = [
    { value: '', label: 'No shot' },
    ...allShots.map(({ number, shot }) => ({
      value: String(shot.id),
      label: `${number === null ? '' : `${number} · `}${shot.title}`,
    })),
  ]
  const shot = frame.shotId === null ? undefined : plan.shots.get(frame.shotId)

  const handleShot = (value: string) => {
    const chosen = plan.shots.get(value)
    write({ shotId: chosen ? chosen.shot.id : null })
    if (chosen && chosen.cover === null) patchItem(doc, shots, chosen.shot.id, { coverFrameId: frame.id })
  }
  const handleHang = () => {
    const size = { w: 40 * frame.palette.length, h: 58 }
    const occupied = [...control.items().values()].filter((entry) => entry.kind !== 'area').map((entry) => entry.box)
    const [box] = arrangeNew(
      [size],
      occupied,
      { x: frame.box[0], y: bottomOf(frame.box) + 24 },
      Math.max(size.w, rightOf(frame.box) - frame.box[0]),
      20,
    )
    if (!box) return
    const id = asStep(control, () =>
      addPalette(doc, box, { title: frame.caption.slice(0, 100), colours: frame.palette }, control.made()),
    )
    select(control.state, [id])
    goTo(control, box)
    announce(control, 'The palette hangs on the wall')
  }

  return (
    <>
      <PictureTrouble frame={frame} mayWrite={mayWrite} />
      {frame.palette.length > 0 && (
        <>
          <SwatchStrip colours={frame.palette} label="Palette of the picture" />
          <ColourCompare palette={frame.palette} prefer={frame.lookId} />
          {mayWrite && (
            <Button size="small" variant="quiet" className="mt-0.5 -ml-2.5" onClick={handleHang}>
              Hang this palette
            </Button>
          )}
        </>
      )}
      <div className="mt-2 flex flex-col gap-0.5">
        <TextRow
          label="Caption"
          value={frame.caption}
          maxLength={300}
          mayWrite={mayWrite}
          placeholder="What it is here for"
          onWrite={(caption) => write({ caption })}
        />
        <ChoiceRow
          label="For look"
          value={frame.lookId !== null && plan.looks.has(frame.lookId) ? frame.lookId : ''}
          options={looks}
          mayWrite={mayWrite}
          onWrite={(value) => write({ lookId: value === '' ? null : value })}
        />
        <ChoiceRow
          label="For shot"
          value={shot ? shot.shot.id : ''}
          options={shotOptions}
          mayWrite={mayWrite}
          onWrite={handleShot}
        />
        {mayWrite && shot && shot.shot.coverFrameId !== frame.id && (
          <Button
            size="small"
            variant="quiet"
            className="ml-[60px] justify-start self-start"
            onClick={() => patchItem(doc, shots, shot.shot.id, { coverFrameId: frame.id })}
          >
            Make it the cover
          </Button>
        )}
        <ChoiceRow
          label="Rights"
          value={frame.rights}
          options={FRAME_RIGHTS.map((value) => ({ value, label: RIGHTS_WORDS[value] }))}
          mayWrite={mayWrite}
          onWrite={(rights) => write({ rights })}
        />
        <TextRow
          label="Credit"
          value={frame.credit}
          maxLength={200}
          mayWrite={mayWrite}
          placeholder="Who made it"
          onWrite={(credit) => write({ credit })}
        />
        <TextRow
          label="Taken at"
          value={frame.exposure}
          maxLength={120}
          mayWrite={mayWrite}
          placeholder="Not known"
          onWrite={(exposure) => write({ exposure })}
        />
        {frame.made && (
          <Row label="Hung by">
            <span className="px-1.5 py-[3px] text-[0.78125rem]">{frame.made.name}</span>
          </Row>
        )}
      </div>
      {!control.isPast && <FrameComments frameId={frame.id} />}
    </>
  )
}
