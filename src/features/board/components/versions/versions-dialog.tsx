import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { useNavigate } from 'react-router-dom'
import type { Version } from '#shared/api/versions.ts'
import { canInShoot } from '#shared/access/roles.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { Waiting } from '#src/ui/waiting.tsx'
import { boardQueries } from '../../queries.ts'
import { versionDays } from '../../versions/version-days.ts'
import { KeepForm } from './keep-form.tsx'
import { TakeBackDialog } from './take-back-dialog.tsx'
import { VersionRow } from './version-row.tsx'

type VersionsDialogProps = { open: boolean; onOpenChange: (open: boolean) => void }

/** The kept versions of the board: keep one more, look at one, take one back. */
export function VersionsDialog({ open, onOpenChange }: VersionsDialogProps) {
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title="Kept versions"
      description="The board and its shots as they stood, to look at and to take back."
    >
      <Versions onDone={() => onOpenChange(false)} />
    </Dialog>
  )
}

function Versions({ onDone }: { onDone: () => void }) {
  const shoot = useShoot()
  const navigate = useNavigate()
  const { data, error } = useQuery(boardQueries.versions(shoot.id))
  const [takingBack, setTakingBack] = useState<Version | null>(null)
  const mayWrite = canInShoot(shoot.role, 'versions.write')
  const board = `/shoots/${shoot.id}/board`
  if (!data) return error ? <FormError>{error.message}</FormError> : <Waiting />
  const { zone } = shoot.brief
  return (
    <>
      {mayWrite && <KeepForm versions={data.versions} />}
      {data.versions.length === 0 && (
        <p className="mt-4 text-ink-soft">
          {mayWrite
            ? 'No version is kept yet: keep one before a change that you may want to take back.'
            : 'No version is kept yet.'}
        </p>
      )}
      {versionDays(data.versions, zone).map(({ date, title, versions }) => (
        <section key={date} aria-label={title ?? 'Versions'} className="mt-4">
          {title !== null && <h3 className="label-small mb-1 font-sans">{title}</h3>}
          <ul>
            {versions.map((version) => (
              <VersionRow
                key={version.id}
                version={version}
                to={`${board}/versions/${version.id}`}
                zone={zone}
                mayWrite={mayWrite}
                onLook={onDone}
                onTakeBack={() => setTakingBack(version)}
              />
            ))}
          </ul>
        </section>
      ))}
      {takingBack && (
        <TakeBackDialog
          version={takingBack}
          onClose={() => setTakingBack(null)}
          onTakenBack={() => {
            setTakingBack(null)
            onDone()
            void navigate(board)
          }}
        />
      )}
    </>
  )
}
