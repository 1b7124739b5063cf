import type { Piece } from '#shared/domain/looks/schema.ts'
import type { PieceCosts } from '#shared/api/private.ts'
import type { Plan } from '#shared/domain/plan/read-plan.ts'
import { cn } from '#src/lib/cn.ts'
import { Swatch } from '#src/ui/swatch.tsx'
import { backBy, byUrgency, isLate, isPieceDue, mergeWarning, moneyWords } from '../words.ts'

export type PieceTableProps = {
  plan: Plan
  pieces: readonly Piece[]
  /** Absent for who may not see cost and size. */
  costs: PieceCosts | undefined
  today: string
  chosen: string | null
  onOpen: (pieceId: string) => void
}

/** Every piece, those that still need somebody first. On phones each piece is two lines. */
export function PieceTable({ plan, pieces, costs, today, chosen, onOpen }: PieceTableProps) {
  const sorted = [...pieces].sort(byUrgency(today))
  const costOf = (piece: Piece) => costs?.pieces.find(({ pieceId }) => pieceId === piece.id)
  const wornBy = (piece: Piece) =>
    [...plan.looks.values()].filter(({ look }) => look.pieceIds.includes(piece.id)).map(({ look }) => look.name)
  const noteOf = (piece: Piece) => [piece.note, mergeWarning(piece, plan)].filter(Boolean).join(' · ')
  return (
    <section aria-label="Pieces" className="overflow-x-auto rounded-r border border-hair bg-paper">
      <table className="w-full border-collapse text-[0.8125rem] [&_td]:border-t [&_td]:border-hair-soft [&_td]:px-2.5 [&_td]:py-[7px] [&_th]:px-2.5 [&_th]:py-[7px] [&_th]:text-left [&_th]:text-xs [&_th]:font-semibold [&_th]:text-ink-soft">
        <thead>
          <tr>
            <th scope="col">Piece</th>
            <th scope="col" className="max-md:hidden">
              From
            </th>
            {costs && (
              <th scope="col" className="max-md:hidden">
                Size
              </th>
            )}
            <th scope="col">Status</th>
            {costs && (
              <th scope="col" className="max-md:hidden">
                Cost
              </th>
            )}
            <th scope="col" className="whitespace-nowrap">
              Back by
            </th>
            <th scope="col" className="max-lg:hidden">
              Worn in
            </th>
            <th scope="col" className="max-lg:hidden">
              Note
            </th>
          </tr>
        </thead>
        <tbody>
          {sorted.map((piece) => {
            const cost = costOf(piece)
            return (
              <tr key={piece.id} className={cn('relative', chosen === piece.id ? 'bg-draft-wash' : 'hover:bg-ink/3')}>
                <td className="max-w-72">
                  <span className="flex items-center gap-2">
                    <Swatch colour={piece.colour} />
                    <button
                      type="button"
                      aria-pressed={chosen === piece.id}
                      onClick={() => onOpen(piece.id)}
                      className="min-w-0 py-0.5 text-left font-semibold before:absolute before:inset-0 max-md:min-h-9"
                    >
                      {piece.name}
                    </button>
                  </span>
                </td>
                <td className="max-md:hidden">{piece.source || '·'}</td>
                {costs && <td className="max-md:hidden">{cost?.size || '·'}</td>}
                <td
                  className={cn(
                    'whitespace-nowrap',
                    isPieceDue(piece, today) && piece.status !== 'returned' && 'font-semibold text-glow-ink',
                  )}
                >
                  {piece.status}
                </td>
                {costs && (
                  <td className="whitespace-nowrap max-md:hidden">{cost?.cost ? moneyWords(cost.cost) : '·'}</td>
                )}
                <td className={cn('whitespace-nowrap', isLate(piece, today) && 'font-semibold text-glow-ink')}>
                  {backBy(piece, today) || '·'}
                </td>
                <td className="max-w-56 max-lg:hidden">{wornBy(piece).join(', ') || 'no look'}</td>
                <td className="max-w-72 text-ink-soft max-lg:hidden">{noteOf(piece) || '·'}</td>
              </tr>
            )
          })}
        </tbody>
      </table>
    </section>
  )
}
