import { Menu as MenuIcon, Search } from 'lucide-react'
import { Button as AriaButton } from 'react-aria-components'
import { Link as RouterLink, useLocation } from 'react-router-dom'
import { useSession } from '../api/session.ts'
import { Button } from '../components/button.tsx'
import { IconButton } from '../components/icon-button.tsx'
import { KeyHint } from '../components/key-hint.tsx'
import { Menu } from '../components/menu.tsx'
import { Ribbon } from '../components/ribbon.tsx'
import { classNames } from '../lib/class-names.ts'
import { paths } from '../paths.ts'
import { AccountMenu } from './account-menu.tsx'
import { performAction } from './actions/registry.ts'
import { isCurrentPage, PAGES, type PageEntry } from './pages.ts'

const openPalette = (): void => void performAction('app.find')

function BarLink({ page, pathname }: { page: PageEntry; pathname: string }) {
  const isCurrent = isCurrentPage(page, pathname)
  return (
    <li>
      <RouterLink
        to={page.path}
        aria-current={isCurrent ? 'page' : undefined}
        className={classNames('block rounded-sm py-1.5 no-underline hover:text-ink', isCurrent ? 'font-medium text-ink shadow-[0_2px_0_var(--accent)]' : 'text-muted')}
      >
        {page.label}
      </RouterLink>
    </li>
  )
}

/** The slim bar: five nouns for everybody, the desk for those who may, the ribbon, the find box and the account. */
export function TopBar() {
  const { permissions, catalogue, state } = useSession()
  const { pathname } = useLocation()
  const allowed = PAGES.filter((page) => !page.needs || permissions.includes(page.needs))
  const main = allowed.filter((page) => page.bar === 'main')
  const desk = allowed.filter((page) => page.bar === 'desk')
  const isDemonstration = catalogue?.kind === 'demonstration'
  return (
    <header data-shell className="sticky top-0 z-40 border-b border-line bg-paper">
      <div className="mx-auto flex h-14 max-w-[96rem] items-center gap-4 px-4 sm:px-8">
        <Menu
          label="Pages"
          trigger={<IconButtonForMenu />}
          items={[...main, ...(desk.length > 0 ? [{ id: 'desk', separator: true as const }] : []), ...desk].map((entry) =>
            'separator' in entry ? entry : { id: entry.path, label: entry.label, hint: entry.hint, href: entry.path },
          )}
        />
        <RouterLink to={paths.home} className="rounded-sm font-serif text-[1.375rem] leading-none font-semibold text-ink no-underline">
          Vicinage
        </RouterLink>
        <nav aria-label="Pages" className="ml-3 hidden min-[1180px]:block">
          <ul className="flex items-center gap-6">
            {main.map((page) => (
              <BarLink key={page.path} page={page} pathname={pathname} />
            ))}
            {desk.length > 0 && <li aria-hidden className="h-6 border-l border-line" />}
            {desk.map((page) => (
              <BarLink key={page.path} page={page} pathname={pathname} />
            ))}
          </ul>
        </nav>
        <div className="ml-auto flex items-center gap-3 sm:gap-4">
          {isDemonstration && (
            <div className="hidden sm:block">
              <Ribbon>Demonstration data, invented</Ribbon>
            </div>
          )}
          <AriaButton
            onPress={openPalette}
            aria-keyshortcuts="Control+K Meta+K"
            className="control hidden w-56 items-center justify-between gap-2 border-line px-3 text-left text-muted data-hovered:border-edge min-[1360px]:flex"
          >
            <span className="truncate">Find a galaxy or page</span>
            <KeyHint keys="Mod+k" />
          </AriaButton>
          <div className="min-[1360px]:hidden">
            <IconButton label="Find a galaxy or page" keys="Mod+k" icon={<Search size={18} aria-hidden />} onPress={openPalette} />
          </div>
          <div className="flex w-[5.25rem] justify-end">
            <AccountMenu />
          </div>
        </div>
      </div>
      {(isDemonstration || state === 'loading') && (
        <div className="flex h-8 items-center justify-center border-t border-line sm:hidden">{isDemonstration && <Ribbon>Demonstration data, invented</Ribbon>}</div>
      )}
    </header>
  )
}

function IconButtonForMenu() {
  return (
    <Button kind="plain" aria-label="Pages" className="-ml-2 px-2! min-[1180px]:hidden">
      <MenuIcon size={18} aria-hidden />
    </Button>
  )
}
