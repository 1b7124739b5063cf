import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { canInShoot } from '#shared/access/roles.ts'
import type { SignOffState } from '#shared/domain/sign-off/state.ts'
import { pieces as pieceItems, sitters as sitterItems } from '#shared/realtime/documents.ts'
import { useMayWrite, useRole, useShoot } from '#src/realtime/shoot-realtime.tsx'
import { useItems } from '#src/realtime/use-items.ts'
import { usePlan } from '#src/realtime/use-plan.ts'
import { useUndo } from '#src/realtime/use-undo.ts'
import { useUndoKeys } from '#src/realtime/use-undo-keys.ts'
import { Button } from '#src/ui/button.tsx'
import { Empty } from '#src/ui/empty.tsx'
import { type ScreenAction, ScreenBar } from '#src/ui/screen-bar.tsx'
import { lookQueries } from '../queries.ts'
import { railsOf, sharedPieces, sumOf } from '../rails.ts'
import { civilDateIn } from '../words.ts'
import { HangLookDialog } from './hang-look-dialog.tsx'
import { LookByShot } from './look-by-shot.tsx'
import { LookCard } from './look-card.tsx'
import { LookPanel } from './look-panel.tsx'
import { PiecePanel } from './piece-panel.tsx'
import { PieceTable } from './piece-table.tsx'
import { PullList } from './pull-list.tsx'
import { SitterPanel } from './sitter-panel.tsx'
import { SitterRail } from './sitter-rail.tsx'

type Chosen = { kind: 'sitter' | 'look' | 'piece'; id: string }
type Opened = { kind: 'hang'; sitterId: string | null } | { kind: 'by shot' } | { kind: 'pull list' } | null

export type LooksScreenProps = {
  /** Where each look stands with the client, by look id; a look that is not there waits. */
  signOffs: ReadonlyMap<string, SignOffState>
}

const WAITING: SignOffState = { kind: 'waiting' }

/** Sitters as rails with their looks, the pieces below, what is chosen at the side. */
export function LooksScreen({ signOffs }: LooksScreenProps) {
  const shoot = useShoot()
  const role = useRole()
  const plan = usePlan()
  const mayWrite = useMayWrite('looks')
  const sitters = useItems('looks', sitterItems)
  const pieces = useItems('looks', pieceItems)
  const costs = useQuery({ ...lookQueries.costs(shoot.id), enabled: canInShoot(role, 'piece-costs.read') })
  const sizes = useQuery({ ...lookQueries.sizes(shoot.id), enabled: canInShoot(role, 'sizes.read') })
  const [chosen, setChosen] = useState<Chosen | null>(null)
  const [opened, setOpened] = useState<Opened>(null)
  useUndoKeys(useUndo(['looks']))

  const [openedAtMs] = useState(Date.now)
  const today = civilDateIn(shoot.brief.zone, openedAtMs)
  const rails = railsOf(plan, sitters)
  const alsoIn = sharedPieces(rails.flatMap(({ looks }) => looks))
  const stateOf = (lookId: string) => signOffs.get(lookId) ?? WAITING
  const open = (kind: Chosen['kind']) => (id: string) => setChosen({ kind, id })
  const close = () => setChosen(null)

  const isEmpty = plan.looks.size === 0 && sitters.size === 0 && pieces.size === 0
  const actions: ScreenAction[] = [
    ...(isEmpty
      ? []
      : [{ label: 'Look by shot', variant: 'quiet' as const, onPress: () => setOpened({ kind: 'by shot' }) }]),
    ...(isEmpty ? [] : [{ label: 'Pull list', onPress: () => setOpened({ kind: 'pull list' }) }]),
    ...(mayWrite
      ? [
          {
            label: 'Hang a look',
            variant: 'primary' as const,
            onPress: () => setOpened({ kind: 'hang', sitterId: null }),
          },
        ]
      : []),
  ]

  return (
    <div className="flex min-h-full items-start">
      <div className="min-w-0 flex-1">
        <ScreenBar title="Looks" sub={chosen ? '' : sumOf(plan, rails.length, stateOf)} actions={actions} float />
        {isEmpty ? (
          <Empty
            title="Nothing hangs here yet"
            action={
              mayWrite && <Button onClick={() => setOpened({ kind: 'hang', sitterId: null })}>Begin with a look</Button>
            }
          >
            A look is what one sitter wears, with hair and make-up. Each hangs on its sitter’s rail with its pictures
            and pieces, and the client signs it off.
          </Empty>
        ) : (
          <div className="flex flex-col gap-5 px-4 pt-4 pb-24 md:px-6 md:pt-0 md:pb-10">
            <div className="flex flex-wrap gap-x-5 gap-y-6 max-md:flex-col max-md:flex-nowrap">
              {rails.map(({ sitter, looks }) => (
                <SitterRail
                  key={sitter?.id ?? 'nobody'}
                  sitter={sitter}
                  looks={looks.length}
                  isChosen={chosen?.kind === 'sitter' && chosen.id === sitter?.id}
                  onOpen={() => sitter && open('sitter')(sitter.id)}
                  onHang={mayWrite && sitter ? () => setOpened({ kind: 'hang', sitterId: sitter.id }) : undefined}
                >
                  {looks.map((planned) => (
                    <LookCard
                      key={planned.look.id}
                      planned={planned}
                      plan={plan}
                      state={stateOf(planned.look.id)}
                      isChosen={chosen?.kind === 'look' && chosen.id === planned.look.id}
                      alsoIn={alsoIn.get(planned.look.id) ?? new Map()}
                      onOpen={() => open('look')(planned.look.id)}
                    />
                  ))}
                </SitterRail>
              ))}
            </div>
            {pieces.size > 0 && (
              <PieceTable
                plan={plan}
                pieces={[...pieces.values()]}
                costs={costs.data}
                today={today}
                chosen={chosen?.kind === 'piece' ? chosen.id : null}
                onOpen={open('piece')}
              />
            )}
          </div>
        )}
      </div>
      {panel()}
      {opened?.kind === 'hang' && (
        <HangLookDialog
          sitters={rails.flatMap(({ sitter }) => sitter ?? [])}
          onSitterId={opened.sitterId}
          onClose={() => setOpened(null)}
          onHung={(lookId) => {
            setOpened(null)
            open('look')(lookId)
          }}
        />
      )}
      <LookByShot open={opened?.kind === 'by shot'} onOpenChange={() => setOpened(null)} plan={plan} />
      <PullList
        open={opened?.kind === 'pull list'}
        onOpenChange={() => setOpened(null)}
        pieces={[...pieces.values()]}
        plan={plan}
        today={today}
      />
    </div>
  )

  function panel() {
    if (!chosen) return null
    const common = { mayWrite, onClose: close }
    switch (chosen.kind) {
      case 'look': {
        const planned = plan.looks.get(chosen.id)
        const known = rails.flatMap(({ sitter }) => sitter ?? [])
        return (
          planned && (
            <LookPanel
              {...common}
              key={chosen.id}
              planned={planned}
              plan={plan}
              state={stateOf(chosen.id)}
              sitters={known}
              pieces={pieces}
              onOpenLook={open('look')}
              onOpenPiece={open('piece')}
            />
          )
        )
      }
      case 'sitter': {
        const sitter = sitters.get(chosen.id)
        const theirs = rails.find((rail) => rail.sitter?.id === chosen.id)?.looks.map(({ look }) => look) ?? []
        return (
          sitter && (
            <SitterPanel
              {...common}
              key={chosen.id}
              sitter={sitter}
              theirLooks={theirs}
              sizes={sizes.data}
              onOpen={open('sitter')}
            />
          )
        )
      }
      case 'piece': {
        const piece = pieces.get(chosen.id)
        return (
          piece && (
            <PiecePanel
              {...common}
              key={chosen.id}
              piece={piece}
              plan={plan}
              costs={costs.data}
              onOpen={open('piece')}
            />
          )
        )
      }
    }
  }
}
