import { useQuery } from '@tanstack/react-query'
import { useMemo } from 'react'
import type { Version } from '#shared/api/versions.ts'
import { useMayWrite, useShootContext } from '#src/realtime/shoot-realtime.tsx'
import { Button } from '#src/ui/button.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { toast } from '#src/ui/toast.ts'
import { Waiting } from '#src/ui/waiting.tsx'
import { useTakeBack } from '../../mutations.ts'
import { boardQueries } from '../../queries.ts'
import { differenceLines } from '../../versions/difference-words.ts'
import {
  KEPT_KINDS,
  type KeptKind,
  type OpenKept,
  openVersion,
  versionDifferences,
} from '../../versions/take-back-version.ts'

type TakeBackDialogProps = {
  version: Pick<Version, 'id' | 'name'>
  onClose: () => void
  onTakenBack: () => void
}

/** Says in words what taking a version back changes, and does it. */
export function TakeBackDialog({ version, onClose, onTakenBack }: TakeBackDialogProps) {
  const { shoot, documents } = useShootContext()
  const may = { board: useMayWrite('board'), plan: useMayWrite('plan') }
  const kinds = KEPT_KINDS.filter((kind) => may[kind])
  const { data: states, error } = useQuery(boardQueries.version(shoot.id, version.id))
  const takeBack = useTakeBack()
  const past = useMemo(() => states && openVersion(states, documents), [states, documents])
  const lines = past && differenceLines(versionDifferences(documents, past, kinds))
  const differs = lines !== undefined && lines.length > 0

  const handleTakeBack = () =>
    takeBack.mutate(
      { id: version.id, kinds },
      {
        onSuccess: ({ written: [kind] }) => {
          const undo = kind && undoOf(documents[kind])
          toast.say(`The board is as it was in “${version.name}”.`, undo && { label: 'Undo', onPress: undo })
          onTakenBack()
        },
      },
    )
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Take back “${version.name}”?`}
      footer={
        <>
          <Button onClick={onClose}>{differs ? 'Leave it as it is' : 'Close'}</Button>
          {differs && (
            <Button variant="primary" busy={takeBack.isPending} onClick={handleTakeBack}>
              Take it back
            </Button>
          )}
        </>
      }
    >
      <FormError>{(takeBack.error ?? error)?.message ?? null}</FormError>
      {!lines && !error && <Waiting label="Comparing" />}
      {lines && (
        <div className="flex flex-col gap-3 text-base text-ink-soft">
          {differs ? (
            <>
              <p>On everybody’s screen, at once:</p>
              <dl className="grid grid-cols-[auto_1fr] gap-x-4 gap-y-1">
                {lines.map(({ what, things }) => (
                  <div key={what} className="contents">
                    <dt>{what}</dt>
                    <dd className="font-semibold text-ink">{things}</dd>
                  </div>
                ))}
              </dl>
              <p>What is there now is kept first, so that anybody can take that back. You can undo it as well.</p>
            </>
          ) : (
            <p>The board is as it was then. There is nothing to take back.</p>
          )}
          {!may.board && (
            <p>The wall and the shots stay as they are now, because you may read the board and not change it.</p>
          )}
          {!may.plan && (
            <p>Days, sets and minutes stay as they are now, because you may read the plan and not change it.</p>
          )}
        </div>
      )}
    </Dialog>
  )
}

/** Undoes the newest step as long as it is that, and no other one. */
function undoOf({ doc, undo }: OpenKept[KeptKind]): () => void {
  const step = undo.undoStack.at(-1)
  return () => {
    if (!doc.isDestroyed && undo.undoStack.at(-1) === step) undo.undo()
    else toast.say('More has happened since. The board as it was before is among the kept versions.')
  }
}
