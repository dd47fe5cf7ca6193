import { CircleUser, LogIn } from 'lucide-react'
import { useLocation } from 'react-router-dom'
import { useSession, useSignOut } from '../api/session.ts'
import { Button } from '../components/button.tsx'
import { Menu, type MenuProps } from '../components/menu.tsx'
import { notify } from '../components/toast.tsx'
import { useLocalSetting } from '../lib/local-setting.ts'
import { themeSetting, type ThemeChoice } from '../lib/theme.ts'
import { paths } from '../paths.ts'
import { performAction } from './actions/registry.ts'

export const THEME_WORDS: Record<ThemeChoice, string> = { system: 'as the device', paper: 'Paper', night: 'Night' }
const NEXT_THEME: Record<ThemeChoice, ThemeChoice> = { system: 'paper', paper: 'night', night: 'system' }

const initialsOf = (name: string): string =>
  name
    .split(/\s+/)
    .map((word) => word[0] ?? '')
    .slice(0, 2)
    .join('')
    .toUpperCase()

/** Signing in and out, the theme, the keys. */
export function AccountMenu() {
  const { user, state } = useSession()
  const signOut = useSignOut()
  const [theme, setTheme] = useLocalSetting(themeSetting)
  const location = useLocation()

  const settings: MenuProps['items'] = [
    { id: 'theme', label: `Theme: ${THEME_WORDS[theme]}`, hint: `change to ${THEME_WORDS[NEXT_THEME[theme]]}`, onAction: () => setTheme(NEXT_THEME[theme]) },
    { id: 'keys', label: 'Keys', keys: '?', onAction: () => void performAction('app.keys') },
  ]
  const leave = (): void => {
    signOut.mutate(undefined, {
      onSuccess: () => notify('Signed out. The newest release is shown.', { tone: 'good' }),
      onError: () => notify('Signing out did not work: the server did not answer. You are still signed in; try again.', { tone: 'stop' }),
    })
  }
  const items: MenuProps['items'] = user
    ? [
        { id: 'account', label: user.name, hint: user.email, href: paths.account },
        { id: 'after-account', separator: true },
        ...settings,
        { id: 'before-out', separator: true },
        { id: 'out', label: 'Sign out', onAction: leave },
      ]
    : [
        { id: 'in', label: 'Sign in', icon: <LogIn size={16} aria-hidden />, href: paths.signInFrom(location.pathname + location.search) },
        { id: 'after-in', separator: true },
        ...settings,
      ]
  const trigger = user ? (
    <Button kind="plain" aria-label={`Account of ${user.name}`} className="px-1.5!">
      <span aria-hidden className="flex size-8 items-center justify-center rounded-full border border-edge bg-sheet text-xs font-semibold">
        {initialsOf(user.name)}
      </span>
    </Button>
  ) : (
    <Button kind="plain" aria-label="Sign in and settings" className="px-2!">
      <CircleUser size={18} aria-hidden />
      <span className="hidden sm:inline">{state === 'loading' ? '' : 'Sign in'}</span>
    </Button>
  )
  return <Menu label="Account and settings" trigger={trigger} items={items} />
}
