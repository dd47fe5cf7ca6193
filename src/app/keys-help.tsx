import { Dialog } from '../components/dialog.tsx'
import { KeyHint } from '../components/key-hint.tsx'
import { Switch } from '../components/switch.tsx'
import { isSingleKey, showKeys, singleKeysSetting } from '../lib/keyboard.ts'
import { useLocalSetting } from '../lib/local-setting.ts'
import { useAvailableActions } from './actions/use-actions.ts'

/** Always there, whatever the page: said here because the components handle them. */
const STANDING_KEYS = [
  { keys: 'ArrowDown', label: 'In a table: next row (also Page Down, Home, End)' },
  { keys: 'Enter', label: 'In a table: open the row' },
  { keys: 'Mod+c', label: 'In a table: copy the row' },
  { keys: 'Escape', label: 'Close what is open' },
]

/** The keys that work on this page, from the same list that makes them work. */
export function KeysHelp({ isOpen, onOpenChange }: { isOpen: boolean; onOpenChange: (isOpen: boolean) => void }) {
  const actions = useAvailableActions()
  const [single, setSingle] = useLocalSetting(singleKeysSetting)
  const groups = new Map<string, { keys: string; label: string }[]>()
  for (const { keys, label, group = 'Here' } of actions) {
    if (!keys || (single === 'off' && isSingleKey(keys))) continue
    groups.set(group, [...(groups.get(group) ?? []), { keys, label }])
  }
  groups.set('Everywhere', [...(groups.get('Everywhere') ?? []), ...STANDING_KEYS])
  return (
    <Dialog title="Keys on this page" isOpen={isOpen} onOpenChange={onOpenChange}>
      {[...groups].map(([group, entries]) => (
        <section key={group}>
          <h3 className="mb-1 text-sm text-muted">{group}</h3>
          <dl>
            {entries.map(({ keys, label }) => (
              <div key={keys + label} className="flex min-h-8 items-center justify-between gap-4 border-b border-line py-1">
                <dt>{label}</dt>
                <dd>
                  <KeyHint keys={keys} />
                  <span className="sr-only">{showKeys(keys)}</span>
                </dd>
              </div>
            ))}
          </dl>
        </section>
      ))}
      <Switch isSelected={single === 'on'} onChange={(on) => setSingle(on ? 'on' : 'off')} help="Switch them off when you dictate, or when keys are pressed by accident. The choice is kept on this device.">
        Single-letter keys
      </Switch>
    </Dialog>
  )
}
