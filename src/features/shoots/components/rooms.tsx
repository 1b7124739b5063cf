import { useState } from 'react'
import type { Room } from '#shared/domain/shoots/schema.ts'
import { Button } from '#src/ui/button.tsx'
import { RoomDialog } from './room-dialog.tsx'

export type RoomsProps = { rooms: readonly Room[]; readOnly: boolean; shootId: string }

const metres = (value: number) => `${value} m`

/** Size and ceiling in one line, as far as they are known. */
function sizeOf(room: Room): string {
  const floor =
    room.widthM !== null && room.depthM !== null
      ? `${room.widthM} × ${metres(room.depthM)}`
      : room.widthM !== null
        ? `${metres(room.widthM)} wide`
        : room.depthM !== null
          ? `${metres(room.depthM)} deep`
          : ''
  const ceiling = room.ceilingM === null ? '' : `ceiling ${metres(room.ceilingM)}`
  return [floor, ceiling].filter((part) => part !== '').join(' · ')
}

export function Rooms({ rooms, readOnly, shootId }: RoomsProps) {
  const [editing, setEditing] = useState<Room | 'new' | null>(null)
  return (
    <section aria-label="Rooms" className="border-t border-hair pt-5">
      <div className="flex items-baseline justify-between gap-3">
        <h2 className="text-xl">Rooms</h2>
        {!readOnly && (
          <Button size="small" onClick={() => setEditing('new')}>
            Add a room
          </Button>
        )}
      </div>
      {rooms.length === 0 ? (
        <p className="mt-1 text-sm text-ink-soft">
          None yet. {readOnly ? '' : 'Size and ceiling decide which stands fit and where the light can go.'}
        </p>
      ) : (
        <ul className="mt-2">
          {rooms.map((room) => (
            <li key={room.id} className="border-t border-hair-soft first:border-0">
              {readOnly ? (
                <div className="py-2">
                  <RoomFacts room={room} />
                </div>
              ) : (
                <button
                  type="button"
                  aria-label={`Change: ${room.name}`}
                  className="block w-full rounded-r py-2 text-left hover:bg-white"
                  onClick={() => setEditing(room)}
                >
                  <RoomFacts room={room} />
                </button>
              )}
            </li>
          ))}
        </ul>
      )}
      {editing && (
        <RoomDialog
          key={editing === 'new' ? 'new' : editing.id}
          room={editing === 'new' ? null : editing}
          shootId={shootId}
          onClose={() => setEditing(null)}
        />
      )}
    </section>
  )
}

function RoomFacts({ room }: { room: Room }) {
  const size = sizeOf(room)
  const facts: [string, string][] = [
    ['Power', room.power],
    ['Windows', room.windows],
    ['', room.note],
  ]
  return (
    <>
      <span className="flex flex-wrap items-baseline justify-between gap-x-3">
        <b className="font-semibold">{room.name}</b>
        <span className="text-sm text-draft">{size}</span>
      </span>
      {facts.map(
        ([label, text]) =>
          text !== '' && (
            <span key={label} className="block text-sm text-ink-soft">
              {label && <span className="font-semibold">{label}: </span>}
              {text}
            </span>
          ),
      )}
    </>
  )
}
