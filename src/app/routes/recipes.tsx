import { useParams } from 'react-router-dom'
import { canInStudio } from '#shared/access/roles.ts'
import { RecipesScreen } from '#src/features/recipes/components/recipes-screen.tsx'
import { ApiError } from '#src/lib/api.ts'
import { useSession } from '../session.ts'

export function Component() {
  const { studioId } = useParams()
  const { studios } = useSession()
  const studio = studios.find(({ id }) => id === studioId)
  if (!studio) throw new ApiError('NOT_FOUND', 'There is no such studio.')
  return (
    <RecipesScreen
      key={studio.id}
      studioId={studio.id}
      name={studio.name}
      mayChange={canInStudio(studio.role, 'recipes.write')}
    />
  )
}
