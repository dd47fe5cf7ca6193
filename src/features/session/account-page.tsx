import { useNavigate } from 'react-router-dom'
import { can, type Permission } from '../../../core/permissions.ts'
import { useSession, useSignOut } from '../../api/session.ts'
import { Button } from '../../components/button.tsx'
import { Chip } from '../../components/chip.tsx'
import { DefinitionRows } from '../../components/definition-rows.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { FailedState, ProblemNote } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { RadioGroup } from '../../components/radio-group.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { Switch } from '../../components/switch.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { singleKeysSetting } from '../../lib/keyboard.ts'
import { useLocalSetting } from '../../lib/local-setting.ts'
import { rowDensitySetting } from '../../lib/row-density.ts'
import { themeSetting } from '../../lib/theme.ts'
import { paths } from '../../paths.ts'

/** What the permissions of a person come to, in words; one that is missing is said with whom to ask. */
const ABILITIES: readonly { permission: Permission; words: string }[] = [
  { permission: 'catalogue.read-current', words: 'read the current revision and any past one' },
  { permission: 'submission.write', words: 'write submissions and import tables' },
  { permission: 'submission.review', words: 'review what others submitted' },
  { permission: 'figure.write', words: 'keep figures in the gallery' },
  { permission: 'release.publish', words: 'publish releases' },
]

export default function AccountPage() {
  useDocumentTitle('Account')
  const session = useSession()
  return (
    <div className="page">
      <PageHeader title="Account" chips={session.user?.roles.map((role) => <Chip key={role}>{role}</Chip>)} />
      <div className="grid max-w-4xl gap-6 md:grid-cols-2">
        {session.state === 'loading' ? <Skeleton height={280} /> : session.state === 'failed' ? <FailedState error={session.error} onRetry={session.retry} /> : <Person session={session} />}
        <DeviceSettings />
      </div>
    </div>
  )
}

function Person({ session }: { session: ReturnType<typeof useSession> }) {
  const signOut = useSignOut()
  const navigate = useNavigate()
  const { user, permissions } = session
  if (!user) {
    return (
      <EmptyState title="Not signed in" action={<Link look="primary" to={paths.signInFrom(paths.account)}>Sign in</Link>}>
        Your name, your roles and what they allow will be here. The settings beside need no account.
      </EmptyState>
    )
  }
  return (
    <Sheet title={user.name} className="flex flex-col">
      <DefinitionRows
        rows={[
          { label: 'E-mail address', value: user.email },
          ...ABILITIES.map(({ permission, words }) => ({ label: words, value: can(permissions, permission) ? 'yes' : <span className="text-muted">no</span> })),
        ]}
      />
      <p className="mt-3 text-xs text-muted">The steward gives and takes roles.</p>
      <ProblemNote error={signOut.error} />
      <div className="mt-4">
        <Button isPending={signOut.isPending} onPress={() => signOut.mutate(undefined, { onSuccess: () => void navigate(paths.home) })}>
          Sign out
        </Button>
      </div>
    </Sheet>
  )
}

function DeviceSettings() {
  const [theme, setTheme] = useLocalSetting(themeSetting)
  const [rows, setRows] = useLocalSetting(rowDensitySetting)
  const [single, setSingle] = useLocalSetting(singleKeysSetting)
  return (
    <Sheet title="On this device" className="flex flex-col gap-4">
      <RadioGroup
        label="Theme"
        look="chips"
        value={theme}
        onChange={setTheme}
        options={[
          { id: 'system', label: 'as the device' },
          { id: 'paper', label: 'Paper' },
          { id: 'night', label: 'Night' },
        ]}
      />
      <RadioGroup
        label="Rows of tables"
        look="chips"
        value={rows}
        onChange={setRows}
        options={[
          { id: 'dense', label: 'dense' },
          { id: 'comfortable', label: 'comfortable' },
        ]}
      />
      <Switch isSelected={single === 'on'} onChange={(on) => setSingle(on ? 'on' : 'off')} help="Such as j and k. Ctrl K stays, and the list of keys is in the account menu.">
        Single-letter keys
      </Switch>
    </Sheet>
  )
}
