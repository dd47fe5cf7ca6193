import { lazy, Suspense, useEffect, useRef, useState } from 'react'
import { RouterProvider as AriaRouterProvider } from 'react-aria-components'
import { Outlet, ScrollRestoration, useHref, useLocation, useNavigate } from 'react-router-dom'
import { Skeleton } from '../components/skeleton.tsx'
import { ToastRegion } from '../components/toast.tsx'
import { shownTheme, themeSetting } from '../lib/theme.ts'
import { listenForShortcuts } from './actions/shortcuts.ts'
import { useActions } from './actions/use-actions.ts'
import { Footer } from './footer.tsx'
import { SignInAgain } from './sign-in-again.tsx'
import { TopBar } from './top-bar.tsx'

const CommandPalette = lazy(() => import('./command-palette.tsx'))
const KeysHelp = lazy(async () => ({ default: (await import('./keys-help.tsx')).KeysHelp }))

type Opened = 'palette' | 'keys' | null

/** What stands round every page. */
export function AppShell() {
  const navigate = useNavigate()
  const [opened, setOpened] = useState<Opened>(null)
  useEffect(listenForShortcuts, [])
  useActions([
    { name: 'app.find', label: 'Find a galaxy, page or action', keys: 'Mod+k', group: 'Everywhere', perform: () => setOpened('palette') },
    { name: 'app.keys', label: 'Show the keys', keys: '?', group: 'Everywhere', also: 'help shortcuts keyboard', perform: () => setOpened('keys') },
    {
      name: 'app.theme',
      label: 'Change between Paper and Night',
      group: 'Everywhere',
      also: 'theme dark light',
      perform: () => themeSetting.set(shownTheme() === 'night' ? 'paper' : 'night'),
    },
  ])
  const close = (isOpen: boolean): void => {
    if (!isOpen) setOpened(null)
  }
  return (
    <AriaRouterProvider navigate={(to, options) => void navigate(to, options)} useHref={useHref}>
      <div className="flex min-h-dvh flex-col">
        <a href="#content" className="sr-only z-50 rounded-md bg-ink px-4 py-2 text-paper focus:not-sr-only focus:fixed focus:top-2 focus:left-2">
          Skip to the content
        </a>
        <TopBar />
        <Main />
        <Footer />
      </div>
      <ToastRegion />
      <SignInAgain />
      <ScrollRestoration />
      <Suspense>
        {opened === 'palette' && <CommandPalette isOpen onOpenChange={close} />}
        {opened === 'keys' && <KeysHelp isOpen onOpenChange={close} />}
      </Suspense>
    </AriaRouterProvider>
  )
}

/** The page itself. Going to another page puts the focus at its beginning, as a page load would. */
function Main() {
  const { pathname } = useLocation()
  const main = useRef<HTMLElement>(null)
  const shownPath = useRef(pathname)
  useEffect(() => {
    if (shownPath.current === pathname) return
    shownPath.current = pathname
    // Another address of the same kind may keep the focus where it is: a list beside what it opens.
    if (main.current && !main.current.contains(document.activeElement)) main.current.focus({ preventScroll: true })
  }, [pathname])
  return (
    // As tall as the window, so that the footer does not jump when the page comes.
    <main ref={main} id="content" tabIndex={-1} className="flex min-h-[calc(100dvh-57px)] min-w-0 flex-col outline-none">
      <Suspense
        fallback={
          <div className="page">
            <Skeleton lines={8} />
          </div>
        }
      >
        <Outlet />
      </Suspense>
    </main>
  )
}
