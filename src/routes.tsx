import type { ComponentType } from 'react'
import { Navigate, type RouteObject } from 'react-router-dom'
import { AppShell } from './app/app-shell.tsx'
import { NotFoundPage } from './app/not-found-page.tsx'
import { RouteFailure } from './app/route-failure.tsx'
import { paths } from './paths.ts'

/** A page fetched when it is first opened; its file exports the component by default. */
function page(load: () => Promise<{ default: ComponentType }>): RouteObject['lazy'] {
  return async () => ({ Component: (await load()).default })
}

/** The pages, one line each; addresses as in src/paths.ts. */
const pages: RouteObject[] = [
  { index: true, lazy: page(() => import('./features/home/home-page.tsx')) },
  { path: 'atlas', element: <Navigate replace to={paths.sky} /> },
  { path: 'atlas/sky', lazy: page(() => import('./features/atlas/sky-page.tsx')) },
  { path: 'atlas/plane', lazy: page(() => import('./features/atlas/plane-page.tsx')) },
  { path: 'galaxies', lazy: page(() => import('./features/catalogue/galaxies-page.tsx')) },
  { path: 'galaxies/:slug', lazy: page(() => import('./features/galaxy/galaxy-page.tsx')) },
  { path: 'figures', lazy: page(() => import('./features/figures/figures-page.tsx')) },
  { path: 'figures/:id', lazy: page(() => import('./features/figures/figure-page.tsx')) },
  { path: 'hosts', lazy: page(() => import('./features/hosts/hosts-page.tsx')) },
  { path: 'hosts/:slug', lazy: page(() => import('./features/hosts/host-page.tsx')) },
  { path: 'submissions', lazy: page(() => import('./features/submissions/submissions-page.tsx')) },
  { path: 'submissions/new', lazy: page(() => import('./features/submissions/new-page.tsx')) },
  { path: 'submissions/:id', lazy: page(() => import('./features/submissions/submission-page.tsx')) },
  { path: 'review', lazy: page(() => import('./features/review/review-page.tsx')) },
  { path: 'review/:id', lazy: page(() => import('./features/review/review-page.tsx')) },
  { path: 'import', lazy: page(() => import('./features/imports/import-page.tsx')) },
  { path: 'import/:id', lazy: page(() => import('./features/imports/import-page.tsx')) },
  { path: 'sources', lazy: page(() => import('./features/sources/sources-page.tsx')) },
  { path: 'sources/:id', lazy: page(() => import('./features/sources/source-page.tsx')) },
  { path: 'scale', lazy: page(() => import('./features/scale/scale-page.tsx')) },
  { path: 'scale/propose', lazy: page(() => import('./features/scale/propose-page.tsx')) },
  { path: 'releases', lazy: page(() => import('./features/releases/releases-page.tsx')) },
  { path: 'releases/:label', lazy: page(() => import('./features/releases/release-page.tsx')) },
  { path: 'sign-in', lazy: page(() => import('./features/session/sign-in-page.tsx')) },
  { path: 'account', lazy: page(() => import('./features/session/account-page.tsx')) },
  { path: '*', Component: NotFoundPage },
]

export const routes: RouteObject[] = [
  {
    path: '/',
    Component: AppShell,
    errorElement: <RouteFailure />,
    // While the first page's program is on its way: the empty surface, which the shell then fills.
    HydrateFallback: () => null,
    children: [{ errorElement: <RouteFailure />, children: pages }],
  },
]
