import './styles/main.css'
import { QueryClient, QueryClientProvider } from '@tanstack/react-query'
import { StrictMode } from 'react'
import { createRoot } from 'react-dom/client'
import { I18nProvider } from 'react-aria-components'
import { createBrowserRouter, RouterProvider } from 'react-router-dom'
import { ApiProblem } from './api/problem.ts'
import { sessionQuery } from './api/session.ts'
import { followTheme } from './lib/theme.ts'
import { routes } from './routes.tsx'

const RETRIES = 2

const queryClient = new QueryClient({
  defaultOptions: {
    queries: {
      staleTime: 30_000,
      refetchOnWindowFocus: false,
      // A refusal will not change by asking again; a silent or starting server may.
      retry: (count, error) => count < RETRIES && error instanceof ApiProblem && (error.status === 0 || error.status >= 502),
    },
  },
})

followTheme()
// Asked for before the first drawing: the shell waits for it.
void queryClient.prefetchQuery(sessionQuery)

const root = document.getElementById('root')
if (!root) throw new Error('index.html has no element with the id root')
createRoot(root).render(
  <StrictMode>
    <QueryClientProvider client={queryClient}>
      <I18nProvider locale="en-GB">
        <RouterProvider router={createBrowserRouter(routes)} />
      </I18nProvider>
    </QueryClientProvider>
  </StrictMode>,
)
