import { useSuspenseQuery } from '@tanstack/react-query'
import { useState } from 'react'
import type { KitItem } from '#shared/api/kit.ts'
import { kitTable } from '#shared/domain/kit/kit-csv.ts'
import { KIT_KINDS, type KitInput } from '#shared/domain/kit/schema.ts'
import { toCsv } from '#src/lib/csv.ts'
import { saveFile } from '#src/lib/save-file.ts'
import { Button } from '#src/ui/button.tsx'
import { Caution } from '#src/ui/caution.tsx'
import { Confirm } from '#src/ui/confirm.tsx'
import { toast } from '#src/ui/toast.ts'
import { KIND_WORDS, blankItem } from '../kit-words.ts'
import { useChangeKit } from '../mutations.ts'
import { kitQueries } from '../queries.ts'
import { ImportDialog } from './import-dialog.tsx'
import { KitDialog } from './kit-dialog.tsx'
import { KitSection } from './kit-section.tsx'

export type KitTableProps = { studioId: string; mayChange: boolean }

type Editing = { item: KitItem | null; input: KitInput }

/** Everything the studio lights with, by kind, with its numbers and where each comes from. */
export function KitTable({ studioId, mayChange }: KitTableProps) {
  const { data } = useSuspenseQuery(kitQueries.ofStudio(studioId))
  const change = useChangeKit(studioId)
  const [editing, setEditing] = useState<Editing | null>(null)
  const [removing, setRemoving] = useState<KitItem | null>(null)
  const [isImporting, setIsImporting] = useState(false)
  const modifiers = data.kit.filter(({ body }) => body.kind === 'modifier')
  return (
    <div className="flex flex-col gap-7">
      <div className="flex flex-wrap items-start gap-x-6 gap-y-3">
        <p className="max-w-3xl min-w-0 flex-1 basis-96 text-sm text-ink-soft">
          Setups copy these numbers when a light is picked. A change here is offered to open shoots and never made in
          them by itself. <b className="font-semibold text-ink">Assumed</b> is a guess until a meter or a maker’s sheet
          replaces it.
        </p>
        <div className="flex flex-wrap gap-2 md:ml-auto">
          <Button onClick={() => saveFile('Kit room.csv', toCsv(kitTable(data.kit)), 'text/csv')}>Export as CSV</Button>
          {mayChange && <Button onClick={() => setIsImporting(true)}>Import a CSV</Button>}
        </div>
      </div>
      {KIT_KINDS.map((kind) => (
        <KitSection
          key={kind}
          kind={kind}
          items={data.kit.filter((item) => item.body.kind === kind)}
          nameOf={(kitId) => modifiers.find(({ id }) => id === kitId)?.name}
          mayChange={mayChange}
          onAdd={() => setEditing({ item: null, input: blankItem(kind) })}
          onEdit={(item) => setEditing({ item, input: item })}
          onCopy={(item) => setEditing({ item: null, input: { ...item, name: `${item.name}, copy` } })}
          onRemove={setRemoving}
        />
      ))}
      <Caution className="max-w-3xl" title="Loads and heights are the makers’ to set">
        What a stand carries here is for planning. Follow the maker’s limits, bag and tape what stands high, and leave
        mains work to licensed electricians.
      </Caution>
      {editing && (
        <KitDialog
          key={editing.item?.id ?? 'new'}
          title={
            editing.item === null ? `Add: ${KIND_WORDS[editing.input.body.kind].one.toLowerCase()}` : editing.item.name
          }
          input={editing.input}
          modifiers={modifiers}
          isBusy={change.isPending}
          refusal={change.error?.message ?? null}
          onClose={() => {
            setEditing(null)
            change.reset()
          }}
          onSave={(input) =>
            change.mutate(editing.item ? { kind: 'update', item: editing.item, input } : { kind: 'add', input }, {
              onSuccess: () => setEditing(null),
            })
          }
        />
      )}
      {isImporting && <ImportDialog studioId={studioId} kit={data.kit} onClose={() => setIsImporting(false)} />}
      <Confirm
        open={removing !== null}
        onOpenChange={(open) => !open && setRemoving(null)}
        title={`Remove “${removing?.name ?? ''}” from the kit room?`}
        action="Remove"
        onConfirm={() => {
          if (removing)
            change.mutate({ kind: 'remove', item: removing }, { onError: (error) => toast.error(error.message) })
          setRemoving(null)
        }}
      >
        Setups that use it keep their copy of its numbers.
      </Confirm>
    </div>
  )
}
