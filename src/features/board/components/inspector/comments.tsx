import { useQuery } from '@tanstack/react-query'
import { type FormEvent, useState } from 'react'
import { ApiError } from '#src/lib/api.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { Button } from '#src/ui/button.tsx'
import { Textarea } from '#src/ui/textarea.tsx'
import { useAddComment, useRemoveComment } from '../../mutations.ts'
import { boardQueries } from '../../queries.ts'

function timeWords(atMs: number, nowMs: number): string {
  const at = new Date(atMs)
  const sameDay = new Date(nowMs).toDateString() === at.toDateString()
  return new Intl.DateTimeFormat(
    'en-GB',
    sameDay ? { hour: '2-digit', minute: '2-digit' } : { day: 'numeric', month: 'short' },
  ).format(at)
}

function sorry(error: Error): string {
  return error instanceof ApiError ? error.message : 'That was not sent. Your words are still here; try again.'
}

/** What people say about a frame. */
export function FrameComments({ frameId }: { frameId: string }) {
  const shoot = useShoot()
  const { data, isError, dataUpdatedAt } = useQuery(boardQueries.comments(shoot.id))
  const { data: session } = useQuery(boardQueries.session())
  const add = useAddComment(shoot.id, frameId)
  const remove = useRemoveComment(shoot.id)
  const [text, setText] = useState('')
  const comments = (data?.comments ?? []).filter(
    (comment) => comment.subject === 'frame' && comment.subjectId === frameId,
  )

  const handleSubmit = (event: FormEvent) => {
    event.preventDefault()
    if (text.trim() === '' || add.isPending) return
    add.mutate(text.trim(), { onSuccess: () => setText('') })
  }

  return (
    <section aria-label="Comments" className="mt-2.5 border-t border-hair-soft pt-2.5 text-[0.78125rem]">
      {isError && !data && (
        <p className="text-ink-soft">Comments could not be fetched. They come when there is a connection.</p>
      )}
      <ul className="flex flex-col gap-1">
        {comments.map((comment) => (
          <li key={comment.id} className="break-words">
            <b title={comment.name} className="font-semibold">
              {comment.initials}
            </b>{' '}
            <span className="whitespace-pre-wrap">{comment.text}</span>{' '}
            <span className="text-ink-faint">{timeWords(comment.atMs, dataUpdatedAt)}</span>
            {comment.userId === session?.user.id && (
              <button
                type="button"
                aria-label={`Remove your comment “${comment.text}”`}
                className="ml-1 rounded-r px-1 text-xs text-ink-soft underline hover:text-ink max-md:min-h-11"
                onClick={() => remove.mutate(comment.id)}
              >
                remove
              </button>
            )}
          </li>
        ))}
      </ul>
      {remove.isError && <p className="mt-1 font-semibold text-velvet">{sorry(remove.error)}</p>}
      <form onSubmit={handleSubmit} className="mt-2 flex flex-col gap-1.5">
        <Textarea
          rows={1}
          aria-label="Comment"
          placeholder="Say something about it"
          maxLength={2000}
          value={text}
          onChange={(event) => setText(event.target.value)}
          onKeyDown={(event) => {
            if (event.key === 'Enter' && (event.ctrlKey || event.metaKey)) handleSubmit(event)
          }}
          className="!text-[0.78125rem]"
        />
        {text.trim() !== '' && (
          <Button type="submit" size="small" busy={add.isPending} className="self-end">
            Comment
          </Button>
        )}
        {add.isError && (
          <p role="alert" className="font-semibold text-velvet">
            {sorry(add.error)}
          </p>
        )}
      </form>
    </section>
  )
}
