import { useParams } from 'react-router-dom'
import { SetupScreen } from '#src/features/lighting/components/setup-screen.tsx'

export function Component() {
  const { setupId = '' } = useParams()
  return <SetupScreen key={setupId} setupId={setupId} />
}
