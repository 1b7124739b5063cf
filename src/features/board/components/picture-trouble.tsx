import type { Frame } from '#shared/domain/board/schema.ts'
import { useOutbox } from '#src/realtime/outbox/use-outbox.ts'
import { Button } from '#src/ui/button.tsx'
import { Caution } from '#src/ui/caution.tsx'
import { useWall } from '../wall-control.ts'
import { removeFromWall } from '../write-board.ts'

/** What is the matter with a picture that is not on the server, and what can be done. */
export function PictureTrouble({ frame, mayWrite }: { frame: Frame; mayWrite: boolean }) {
  const { doc } = useWall()
  const outbox = useOutbox()
  const { picture } = frame
  const item = outbox.items.find(({ uploadId }) => uploadId === picture.uploadId)
  if (picture.state === 'stored') return null
  const remove = () => {
    outbox.giveUp(picture.uploadId)
    removeFromWall(doc, [frame.id], Date.now())
  }
  if (picture.state === 'waiting') {
    return (
      <Caution tone="draft" className="mb-2 !text-xs">
        {item
          ? 'This picture is kept on this device and goes to the others by itself as soon as there is a connection.'
          : 'This picture has not come yet: it is still on the device that it was added on.'}
      </Caution>
    )
  }
  return (
    <Caution tone="velvet" title="Not kept" className="mb-2 !text-xs">
      {picture.why ?? 'The server did not take this picture.'}
      {mayWrite && (
        <div className="mt-2 flex gap-2">
          {item && (
            <Button size="small" onClick={() => outbox.retry(picture.uploadId)}>
              Try again
            </Button>
          )}
          <Button size="small" variant="danger" onClick={remove}>
            Remove
          </Button>
        </div>
      )}
    </Caution>
  )
}
