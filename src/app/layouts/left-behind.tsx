import { useMutation } from '@tanstack/react-query'
import { useState } from 'react'
import type * as Y from 'yjs'
import { DOCUMENT_KINDS, type DocumentKind } from '#shared/realtime/documents.ts'
import { saveFile } from '#src/lib/save-file.ts'
import { count } from '#src/lib/format.ts'
import { copyOfEdits } from '#src/realtime/copy-of-edits.ts'
import { type LeftBehind, letGo, readLeftBehind } from '#src/realtime/left-behind.ts'
import { sinceWords } from '#src/realtime/save-state.ts'
import { type ShootDocuments, useShootContext } from '#src/realtime/shoot-realtime.tsx'
import { useLeftBehind } from '#src/realtime/use-left-behind.ts'
import { Caution } from '#src/ui/caution.tsx'
import { Button } from '#src/ui/button.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { useSession } from '../session.ts'

type LeftBehindChoiceProps = {
  shoot: { id: string; title: string }
  left: readonly LeftBehind[]
  /** The shoot's documents as the server has them; null when they are not known. */
  documents: ShootDocuments | null
}

/** How many changes are not in the shoot, and what can be done with them: a copy to keep, or to let go of them. */
function LeftBehindChoice({ shoot, left, documents }: LeftBehindChoiceProps) {
  const [isCopied, setIsCopied] = useState(false)
  const edits = left.reduce((sum, one) => sum + one.edits, 0)
  const copy = useMutation({
    mutationFn: async () => {
      const read = await readLeftBehind(left)
      const copied = read.map(({ left: one, doc }) => ({
        left: one,
        mine: doc,
        theirs: syncedDoc(documents, one.kind),
      }))
      const known = documents ? DOCUMENT_KINDS.map((kind) => ({ kind, doc: documents[kind].doc })) : []
      const nowMs = Date.now()
      const day = new Date(nowMs).toISOString().slice(0, 10)
      saveFile(
        `${shoot.title} – changes of ${day}.json`,
        JSON.stringify(copyOfEdits(shoot, copied, known, nowMs), null, 2),
      )
    },
    onSuccess: () => setIsCopied(true),
  })
  const forget = useMutation({ mutationFn: () => letGo(left) })
  return (
    <>
      <p className="text-sm text-ink-soft">
        {isCopied
          ? 'The copy is with your downloads. It is a text file: open it to see what you had changed, and write it down again where it belongs.'
          : `A copy is a text file with what you changed. Without one, ${edits === 1 ? 'it is' : 'they are'} gone for good once you let go.`}
      </p>
      <div className="mt-5 flex flex-wrap justify-end gap-2">
        <Button busy={forget.isPending} variant={isCopied ? 'primary' : 'danger'} onClick={() => forget.mutate()}>
          {isCopied ? 'Go on without them' : `Let go of ${edits === 1 ? 'it' : 'them'}`}
        </Button>
        <Button busy={copy.isPending} variant={isCopied ? 'plain' : 'primary'} onClick={() => copy.mutate()}>
          Save a copy
        </Button>
      </div>
    </>
  )
}

function syncedDoc(documents: ShootDocuments | null, kind: DocumentKind): Y.Doc | null {
  return documents?.[kind].provider.synced ? documents[kind].doc : null
}

/** "3 changes of yours are not in the shoot" */
function leftBehindTitle(left: readonly LeftBehind[]): string {
  const edits = left.reduce((sum, one) => sum + one.edits, 0)
  return `${count(edits, 'change')} of yours ${edits === 1 ? 'is' : 'are'} not in the shoot`
}

/** Since when the oldest of them has been waiting. */
function waitingWords(left: readonly LeftBehind[]): string {
  return `Waiting on this device ${sinceWords(Math.min(...left.map(({ sinceMs }) => sinceMs)), Date.now())}.`
}

/** Asks what is to become of changes that can no longer be sent, while the shoot itself goes on. */
export function LeftBehindNotice() {
  const { shoot, userId, documents } = useShootContext()
  const left = useLeftBehind(userId, shoot.id, shoot.epochs)
  const [isPutOff, setIsPutOff] = useState(false)
  if (left.length === 0) return null
  const why = left.some(({ cache }) => cache.endsWith(':aside'))
    ? 'Your role was changed before this device could send them: you may read that part of the shoot, not change it.'
    : 'The shoot was put back to an earlier state before this device could send them.'
  return (
    <Dialog open={!isPutOff} title={leftBehindTitle(left)} onOpenChange={(isOpen) => setIsPutOff(!isOpen)}>
      <p className="mb-2">
        {why} {waitingWords(left)}
      </p>
      <LeftBehindChoice shoot={{ id: shoot.id, title: shoot.brief.title }} left={left} documents={documents} />
    </Dialog>
  )
}

/** The same on the page of a shoot that is closed to this person. */
export function LeftBehindCard({ shoot }: { shoot: { id: string; title: string } }) {
  const { user } = useSession()
  const left = useLeftBehind(user.id, shoot.id, null)
  if (left.length === 0) return null
  return (
    <Caution title={leftBehindTitle(left)} className="mt-5 w-full pb-3">
      <p className="mb-2">{waitingWords(left)} They cannot be sent any more.</p>
      <LeftBehindChoice shoot={shoot} left={left} documents={null} />
    </Caution>
  )
}
