import type { Piece } from '#shared/domain/looks/schema.ts'
import type { Plan } from '#shared/domain/plan/read-plan.ts'
import { Button } from '#src/ui/button.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { Swatch } from '#src/ui/swatch.tsx'
import { toast } from '#src/ui/toast.ts'
import { backBy } from '../words.ts'

export type PullListProps = {
  open: boolean
  onOpenChange: (open: boolean) => void
  pieces: readonly Piece[]
  plan: Plan
  today: string
}

/** What is to be fetched where: every piece under the place it comes from. */
export function PullList({ open, onOpenChange, pieces, plan, today }: PullListProps) {
  const places = new Map<string, Piece[]>()
  for (const piece of [...pieces]
    .filter(({ status }) => status !== 'returned')
    .sort((a, b) => a.name.localeCompare(b.name))) {
    const place = piece.source.trim() || 'Not said where from'
    places.set(place, [...(places.get(place) ?? []), piece])
  }
  const sorted = [...places].sort(([a], [b]) => a.localeCompare(b))
  const lineOf = (piece: Piece) => {
    const worn = [...plan.looks.values()]
      .filter(({ look }) => look.pieceIds.includes(piece.id))
      .map(({ look }) => look.name)
    return [piece.status, worn.join(', '), piece.dueBack === null ? '' : `back by ${backBy(piece, today)}`]
      .filter(Boolean)
      .join(' · ')
  }
  const copy = () => {
    const text = sorted
      .map(([place, list]) => `${place}\n${list.map((piece) => `- ${piece.name} (${lineOf(piece)})`).join('\n')}`)
      .join('\n\n')
    const copied = navigator.clipboard?.writeText(text) ?? Promise.reject(new Error('no clipboard'))
    copied.then(
      () => toast.say('The pull list is copied.'),
      () => toast.error('This browser does not let the page copy. Mark the list and copy it by hand.'),
    )
  }
  return (
    <Dialog
      wide
      open={open}
      onOpenChange={onOpenChange}
      title="Pull list"
      description="What to fetch where, and when it goes back."
      footer={
        <Button onClick={copy} disabled={sorted.length === 0}>
          Copy as text
        </Button>
      }
    >
      {sorted.length === 0 && <p className="py-8 text-center text-ink-soft">No pieces written down yet.</p>}
      {sorted.map(([place, list]) => (
        <section key={place} className="mb-4">
          <h3 className="text-lg">{place}</h3>
          <ul className="text-sm">
            {list.map((piece) => (
              <li key={piece.id} className="flex items-baseline gap-2.5 border-t border-hair-soft py-1.5">
                <Swatch colour={piece.colour} className="translate-y-0.5" />
                <b className="font-semibold">{piece.name}</b>
                <span className="text-ink-soft">{lineOf(piece)}</span>
              </li>
            ))}
          </ul>
        </section>
      ))}
    </Dialog>
  )
}
