import { type ReactNode, useId, useMemo, useState } from 'react'
import { IMPORT_ROWS_MAX, type KitItem } from '#shared/api/kit.ts'
import { type KitFile, type KitRow, isKitHead, readKitTable } from '#shared/domain/kit/kit-csv.ts'
import { type CsvFile, readCsvFile } from '#src/lib/csv.ts'
import { count } from '#src/lib/format.ts'
import { newId } from '#src/lib/new-id.ts'
import { Button } from '#src/ui/button.tsx'
import { Caution } from '#src/ui/caution.tsx'
import { Checkbox } from '#src/ui/checkbox.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { Field } from '#src/ui/field.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { Input } from '#src/ui/input.tsx'
import { toast } from '#src/ui/toast.ts'
import { useChangeKit } from '../mutations.ts'

export type ImportDialogProps = { studioId: string; kit: readonly KitItem[]; onClose: () => void }

type Chosen = { name: string; file: CsvFile }

/** Reads a file and shows what it would do; nothing is written until somebody agrees. */
export function ImportDialog({ studioId, kit, onClose }: ImportDialogProps) {
  const [chosen, setChosen] = useState<Chosen | null>(null)
  const [isReading, setIsReading] = useState(false)
  const [onlyNew, setOnlyNew] = useState(false)
  const change = useChangeKit(studioId)
  const read = useMemo(
    (): KitFile | null =>
      chosen === null
        ? null
        : chosen.file.kind === 'refused'
          ? chosen.file
          : readKitTable(chosen.file.rows, kit, newId, IMPORT_ROWS_MAX),
    [chosen, kit],
  )
  const rows = read?.kind === 'read' ? read.rows : []
  const taken = rows.filter((row) => row.kind === 'new' || (row.kind === 'change' && !onlyNew))
  const changes = rows.filter((row) => row.kind === 'change')

  async function choose(file: File | undefined) {
    if (!file) return
    setIsReading(true)
    change.reset()
    setChosen({ name: file.name, file: await readCsvFile(file, isKitHead) })
    setIsReading(false)
  }
  function write() {
    const agreed = taken.flatMap((row) =>
      row.kind === 'new' || row.kind === 'change' ? [{ id: row.id, version: row.version, input: row.input }] : [],
    )
    change.mutate(
      { kind: 'import', rows: agreed },
      {
        onSuccess: () => {
          toast.say(`${count(agreed.length, 'item')} written into the kit room.`)
          onClose()
        },
      },
    )
  }

  return (
    <Dialog
      open
      wide
      onOpenChange={(open) => !open && onClose()}
      title="Import a CSV into the kit room"
      description="Its first line names the columns, as in an export. You see what it would do before anything is written."
      footer={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button variant="primary" disabled={taken.length === 0} busy={change.isPending} onClick={write}>
            {taken.length === 0 ? 'Write into the kit room' : `Write ${count(taken.length, 'item')}`}
          </Button>
        </>
      }
    >
      <div className="flex flex-col gap-4">
        <FormError>{change.error?.message ?? (read?.kind === 'refused' ? read.message : null)}</FormError>
        <Field label="File" hint="Commas, semicolons or tabs between the cells.">
          <Input
            type="file"
            accept=".csv,.tsv,.txt,text/csv"
            onChange={(event) => void choose(event.target.files?.[0])}
          />
        </Field>
        <div role="status" className="flex flex-col gap-2">
          {isReading && <p className="text-sm text-ink-soft">Reading the file …</p>}
          {read?.kind === 'read' && <p className="text-base font-semibold">{summary(rows)}</p>}
        </div>
        {chosen?.file.kind === 'read' && read?.kind === 'read' && (
          <Remarks remarks={chosen.file.remarks} leftOut={read.leftOut} />
        )}
        {changes.length > 0 && (
          <Checkbox checked={onlyNew} onChange={setOnlyNew}>
            Only add what is new; leave what is there as it is
          </Checkbox>
        )}
        <Part title="Cannot be taken" rows={rows.filter((row) => row.kind === 'bad')} most={IMPORT_ROWS_MAX}>
          {(row) => row.kind === 'bad' && <span className="text-velvet">{row.messages.join(' ')}</span>}
        </Part>
        {!onlyNew && (
          <Part title="Changes what is there" rows={changes}>
            {(row) => row.kind === 'change' && row.changes.join(' · ')}
          </Part>
        )}
        <Part title="New" rows={rows.filter((row) => row.kind === 'new')}>
          {(row) => row.kind === 'new' && row.input.body.kind}
        </Part>
      </div>
    </Dialog>
  )
}

function summary(rows: readonly KitRow[]): string {
  const of = (kind: KitRow['kind']) => rows.filter((row) => row.kind === kind).length
  return [
    `${of('new')} new`,
    `${count(of('change'), 'change', 'changes')} to what is there`,
    `${of('same')} as they are`,
    `${of('bad')} that cannot be taken`,
  ].join(', ')
}

function Remarks({ remarks, leftOut }: { remarks: readonly string[]; leftOut: readonly string[] }) {
  const all = [
    ...remarks,
    ...(leftOut.length > 0
      ? [`Columns that mean nothing here were left out: ${leftOut.slice(0, 12).join(', ')}.`]
      : []),
  ]
  return all.length === 0 ? null : <Caution tone="draft">{all.join(' ')}</Caution>
}

/** Rows that are shown of a part unless it says otherwise; the file has the others. */
const SHOWN = 200

type PartProps = { title: string; rows: readonly KitRow[]; most?: number; children: (row: KitRow) => ReactNode }

function Part({ title, rows, most = SHOWN, children }: PartProps) {
  const id = useId()
  if (rows.length === 0) return null
  return (
    <section aria-labelledby={id}>
      <h3 id={id} className="mb-1 text-lg">
        {title}
      </h3>
      <ul className="rounded-r border border-hair text-sm">
        {rows.slice(0, most).map((row) => (
          <li
            key={row.line}
            className="grid grid-cols-[4.5rem_minmax(0,1fr)] gap-x-2 border-t border-hair-soft px-3 py-1.5 first:border-t-0 sm:grid-cols-[4.5rem_minmax(0,2fr)_minmax(0,3fr)]"
          >
            <span className="text-ink-soft">Line {row.line}</span>
            <span className="min-w-0 font-semibold break-words">{row.name === '' ? 'No name' : row.name}</span>
            <span className="min-w-0 break-words max-sm:col-start-2">{children(row)}</span>
          </li>
        ))}
      </ul>
      {rows.length > most && <p className="mt-1 text-sm text-ink-soft">And {rows.length - most} more.</p>}
    </section>
  )
}
