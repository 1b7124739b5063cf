import { Camera, ImagePlus, Images } from 'lucide-react'
import { type ChangeEvent, useRef, useState } from 'react'
import type { Look } from '#shared/domain/looks/schema.ts'
import { addMember, orderMembers, removeMember } from '#shared/realtime/collection.ts'
import { looks } from '#shared/realtime/documents.ts'
import { useDoc } from '#src/realtime/shoot-realtime.tsx'
import { useOutbox } from '#src/realtime/outbox/use-outbox.ts'
import { Button } from '#src/ui/button.tsx'
import { Caution } from '#src/ui/caution.tsx'
import { toast } from '#src/ui/toast.ts'
import { useIsPhone } from '#src/ui/use-media.ts'
import { BoardPictures } from './board-pictures.tsx'
import { MoreMenu } from './more-menu.tsx'
import { WardrobePicture } from './wardrobe-picture.tsx'

export type LookPicturesProps = { look: Look; mayWrite: boolean }

/** The pictures of a look, the first one its hero: added from this device or the board, put in order, taken off. */
export function LookPictures({ look, mayWrite }: LookPicturesProps) {
  const doc = useDoc('looks')
  const outbox = useOutbox()
  const isPhone = useIsPhone()
  const [isChoosing, setIsChoosing] = useState(false)
  const files = useRef<HTMLInputElement>(null)
  const camera = useRef<HTMLInputElement>(null)
  const ids = look.pictureIds
  const onWay = outbox.items.filter((item) => item.progress < 1 && ids.some((id) => id === item.uploadId))

  async function add(event: ChangeEvent<HTMLInputElement>) {
    const chosen = [...(event.target.files ?? [])]
    event.target.value = ''
    for (const file of chosen) {
      try {
        const { uploadId } = await outbox.add(file)
        addMember(doc, looks, look.id, 'pictureIds', uploadId, Math.random)
      } catch (error) {
        toast.error(error instanceof Error ? `${file.name}: ${error.message}` : `${file.name} could not be added.`)
      }
    }
  }
  const move = (from: number, to: number) => {
    const order = [...ids]
    const [id] = order.splice(from, 1)
    if (id !== undefined) order.splice(to, 0, id)
    orderMembers(doc, looks, look.id, 'pictureIds', order, Math.random)
  }

  return (
    <div>
      {ids.length === 0 && (
        <p className="rounded-r bg-surround px-4 py-6 text-center text-sm text-ink-soft">
          {mayWrite
            ? 'Pin what the look should be: a reference, a fitting, a drawing. The first picture is the one everybody sees.'
            : 'No picture pinned yet.'}
        </p>
      )}
      <ul className="grid grid-cols-2 gap-2">
        {ids.map((id, index) => (
          <li key={id} className={index === 0 ? 'relative col-span-2' : 'relative'}>
            <WardrobePicture
              uploadId={id}
              alt={`${look.name}, picture ${index + 1}`}
              sizes="340px"
              focus="50% 20%"
              className={index === 0 ? 'h-56 rounded-sm' : 'h-28 rounded-sm'}
            />
            {mayWrite && (
              <span className="absolute top-1 right-1 rounded-r bg-paper/90">
                <MoreMenu
                  label={`Picture ${index + 1}: order or take off`}
                  items={[
                    { label: 'Make it the first', disabled: index === 0, onSelect: () => move(index, 0) },
                    { label: 'Move forward', disabled: index === 0, onSelect: () => move(index, index - 1) },
                    { label: 'Move back', disabled: index === ids.length - 1, onSelect: () => move(index, index + 1) },
                    'line',
                    {
                      label: 'Take it off',
                      danger: true,
                      onSelect: () => {
                        removeMember(doc, looks, look.id, 'pictureIds', id)
                        toast.say('The picture is taken off the look.', {
                          label: 'Put it back',
                          onPress: () => addMember(doc, looks, look.id, 'pictureIds', id, Math.random),
                        })
                      },
                    },
                  ]}
                />
              </span>
            )}
          </li>
        ))}
      </ul>
      {onWay.map((item) =>
        item.state === 'refused' ? (
          <Caution key={item.uploadId} title={item.name} className="mt-2">
            <p>{item.why}</p>
            <div className="mt-2 flex gap-2">
              <Button size="small" onClick={() => outbox.retry(item.uploadId)}>
                Try again
              </Button>
              <Button
                size="small"
                variant="quiet"
                onClick={() => {
                  outbox.giveUp(item.uploadId)
                  removeMember(doc, looks, look.id, 'pictureIds', item.uploadId)
                }}
              >
                Give up
              </Button>
            </div>
          </Caution>
        ) : (
          <div key={item.uploadId} className="mt-2 text-xs text-ink-soft">
            <span className="flex justify-between gap-2">
              <span className="truncate">{item.name}</span>
              <span>
                {item.state === 'sending' ? `${Math.round(item.progress * 100)} %` : 'Kept here, waits for a signal'}
              </span>
            </span>
            <progress
              aria-label={`Sending ${item.name}`}
              max={1}
              value={item.progress}
              className="block h-1.5 w-full accent-glow"
            />
          </div>
        ),
      )}
      {mayWrite && (
        <div className="mt-2 flex flex-wrap gap-2">
          <Button size="small" onClick={() => files.current?.click()}>
            <ImagePlus size={15} aria-hidden />
            Add pictures
          </Button>
          {isPhone && (
            <Button size="small" onClick={() => camera.current?.click()}>
              <Camera size={15} aria-hidden />
              Pin from camera
            </Button>
          )}
          <Button size="small" onClick={() => setIsChoosing(true)}>
            <Images size={15} aria-hidden />
            From the board
          </Button>
          <input
            ref={files}
            type="file"
            accept="image/*"
            multiple
            hidden
            aria-label="Picture files"
            onChange={(event) => void add(event)}
          />
          <input
            ref={camera}
            type="file"
            accept="image/*"
            capture="environment"
            hidden
            aria-label="Camera"
            onChange={(event) => void add(event)}
          />
        </div>
      )}
      <BoardPictures
        open={isChoosing}
        onOpenChange={setIsChoosing}
        chosen={ids}
        onToggle={(id) =>
          ids.some((known) => known === id)
            ? removeMember(doc, looks, look.id, 'pictureIds', id)
            : addMember(doc, looks, look.id, 'pictureIds', id, Math.random)
        }
      />
    </div>
  )
}
