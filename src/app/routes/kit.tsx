import { useState } from 'react'
import { useParams } from 'react-router-dom'
import { canInStudio } from '#shared/access/roles.ts'
import { KitTable } from '#src/features/kit/components/kit-table.tsx'
import { MinutesForm } from '#src/features/studios/components/minutes-form.tsx'
import { ApiError } from '#src/lib/api.ts'
import { ScreenBar } from '#src/ui/screen-bar.tsx'
import { Tabs } from '#src/ui/tabs.tsx'
import { useSession } from '../session.ts'

export function Component() {
  const { studioId } = useParams()
  const { studios } = useSession()
  const [tab, setTab] = useState<'kit' | 'minutes'>('kit')
  const studio = studios.find(({ id }) => id === studioId)
  if (!studio) throw new ApiError('NOT_FOUND', 'There is no such studio.')
  return (
    <>
      <title>{`Kit room · ${studio.name} · Sconce`}</title>
      <ScreenBar title="Kit room" sub="What the numbers of every setup come from" />
      <div className="px-4 pt-3 pb-10 md:px-6 md:pt-0">
        <Tabs
          label="Kit room"
          value={tab}
          onChange={setTab}
          tabs={[
            {
              value: 'kit',
              label: 'Kit',
              content: <KitTable studioId={studio.id} mayChange={canInStudio(studio.role, 'kit.write')} />,
            },
            {
              value: 'minutes',
              label: 'Minutes',
              content: <MinutesForm studioId={studio.id} mayChange={canInStudio(studio.role, 'minutes.write')} />,
            },
          ]}
        />
      </div>
    </>
  )
}
