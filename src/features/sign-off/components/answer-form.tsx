import { useRef, useState } from 'react'
import { signOffConflictSchema } from '#shared/api/sign-off.ts'
import type { LookDifference } from '#shared/domain/sign-off/schema.ts'
import { ApiError } from '#src/lib/api.ts'
import { Button } from '#src/ui/button.tsx'
import { Caution } from '#src/ui/caution.tsx'
import { Field } from '#src/ui/field.tsx'
import { Sheet } from '#src/ui/sheet.tsx'
import { Textarea } from '#src/ui/textarea.tsx'
import { useIsPhone } from '#src/ui/use-media.ts'
import { useAnswerLook } from '../mutations.ts'
import type { LookStanding } from '../use-look-standings.ts'
import { useWordsDraft } from '../use-words-draft.ts'
import { DifferenceList } from './difference-list.tsx'

export type AnswerFormProps = {
  shootId: string
  userId: string
  standing: LookStanding
  onAnswered: (words: string) => void
}

type Trouble = { lookId: string; message: string; differences: readonly LookDifference[] }

const QUESTION = 'Anything to change? Say what and why.'
const KEPT = 'Your name, the time and this exact version are kept with your answer.'

/** The client's two answers. What is typed stays until it is kept by the server, whatever goes wrong. */
export function AnswerForm({ shootId, userId, standing, onAnswered }: AnswerFormProps) {
  const { look } = standing.planned
  const isPhone = useIsPhone()
  const answerLook = useAnswerLook(shootId)
  const [words, setWords] = useWordsDraft(userId, look.id)
  const [missing, setMissing] = useState('')
  const [trouble, setTrouble] = useState<Trouble | null>(null)
  const [isAsking, setIsAsking] = useState(false)
  const field = useRef<HTMLTextAreaElement>(null)
  const isSignedOff = standing.state.kind === 'signed off'

  function answer(kind: 'signed off' | 'change asked') {
    if (kind === 'change asked' && words.trim() === '') {
      setMissing('Say what should change, and why.')
      field.current?.focus()
      return
    }
    setMissing('')
    setTrouble(null)
    answerLook.mutate(
      { lookId: look.id, answer: kind, fingerprint: standing.fingerprint, saw: standing.frozen, words: words.trim() },
      {
        onSuccess: () => {
          setWords('')
          setIsAsking(false)
          onAnswered(
            kind === 'signed off'
              ? `“${look.name}” is signed off.`
              : `Your change to “${look.name}” is on its way to the studio.`,
          )
        },
        onError: (error) => setTrouble(troubleOf(look.id, error)),
      },
    )
  }

  const isBusy = answerLook.isPending
  const busy = (kind: string) => isBusy && answerLook.variables.answer === kind
  const shown = trouble?.lookId === look.id ? trouble : null
  const remark = shown && (
    <Caution title={shown.message} className="mb-3">
      <div role="alert">
        <DifferenceList differences={shown.differences} />
      </div>
    </Caution>
  )
  const question = (
    <Field label={QUESTION} error={missing}>
      <Textarea
        ref={field}
        rows={3}
        className="min-h-16"
        maxLength={2000}
        value={words}
        onChange={(event) => {
          setWords(event.target.value)
          setMissing('')
        }}
      />
    </Field>
  )
  if (!isPhone) {
    return (
      <div className="mt-4">
        {question}
        <div className="mt-3">{remark}</div>
        <div className="flex flex-wrap gap-2.5">
          {!isSignedOff && (
            <Button
              variant="primary"
              busy={busy('signed off')}
              disabled={isBusy}
              onClick={() => answer('signed off')}
              className="px-5 py-[11px]"
            >
              Sign off this look
            </Button>
          )}
          <Button
            busy={busy('change asked')}
            disabled={isBusy}
            onClick={() => answer('change asked')}
            className="px-4 py-[11px]"
          >
            Ask for a change
          </Button>
        </div>
        <p className="mt-3 text-xs text-ink-soft">{KEPT}</p>
      </div>
    )
  }
  return (
    <>
      <p className="order-1 px-[18px] pt-2 pb-4 text-[0.8125rem] text-ink-soft">{KEPT}</p>
      <div className="sticky bottom-0 z-20 order-1 mt-auto border-t border-hair bg-paper px-[18px] pt-3 pb-4">
        {!isAsking && remark}
        <div className="grid grid-cols-[1fr_1.3fr] gap-2.5">
          <Button
            size="large"
            className={isSignedOff ? 'col-span-2' : ''}
            disabled={isBusy}
            onClick={() => setIsAsking(true)}
          >
            Ask for a change
          </Button>
          {!isSignedOff && (
            <Button
              size="large"
              variant="primary"
              aria-label="Sign off this look"
              busy={busy('signed off')}
              disabled={isBusy}
              onClick={() => answer('signed off')}
            >
              Sign off
            </Button>
          )}
        </div>
      </div>
      <Sheet
        open={isAsking}
        onOpenChange={setIsAsking}
        title={look.name}
        footer={
          <Button
            size="large"
            variant="primary"
            className="w-full"
            busy={busy('change asked')}
            disabled={isBusy}
            onClick={() => answer('change asked')}
          >
            Ask for this change
          </Button>
        }
      >
        {remark}
        {question}
      </Sheet>
    </>
  )
}

function troubleOf(lookId: string, error: unknown): Trouble {
  if (!(error instanceof ApiError))
    return {
      lookId,
      message: 'Something on this page went wrong. What you typed is still here; try again.',
      differences: [],
    }
  const conflict = error.code === 'CONFLICT' ? signOffConflictSchema.safeParse(error.details) : undefined
  return { lookId, message: error.message, differences: conflict?.success ? conflict.data.differences : [] }
}
