import '#src/styles/app.css'
import { QueryClientProvider } from '@tanstack/react-query'
import { StrictMode } from 'react'
import { createRoot } from 'react-dom/client'
import { BrowserRouter } from 'react-router-dom'
import { studioQueries } from '#src/features/studios/queries.ts'
import { ApiError } from '#src/lib/api.ts'
import { registerOffline } from '#src/lib/offline.ts'
import { Toaster } from '#src/ui/toaster.tsx'
import { createQueryClient } from './query-client.ts'
import { Screen, fetchAhead } from './router.tsx'

const queryClient = createQueryClient(() => queryClient.setQueryData(studioQueries.session().queryKey, null))

fetchAhead(window.location.pathname)

const root = document.getElementById('root')
if (root) {
  // A refusal of the server is shown by the screen it belongs to; only what is a mistake of ours goes to the console as well.
  const onCaughtError = (error: unknown) => {
    if (!(error instanceof ApiError)) reportError(error)
  }
  createRoot(root, { onCaughtError }).render(
    <StrictMode>
      <QueryClientProvider client={queryClient}>
        <BrowserRouter>
          <Screen />
        </BrowserRouter>
        <Toaster />
      </QueryClientProvider>
    </StrictMode>,
  )
}

registerOffline()
