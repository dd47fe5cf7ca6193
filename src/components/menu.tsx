import type { ReactElement, ReactNode } from 'react'
import { Menu as AriaMenu, MenuItem, MenuTrigger, Popover, Separator, Text } from 'react-aria-components'
import { classNames } from '../lib/class-names.ts'
import { KeyHint } from './key-hint.tsx'

export interface MenuEntry {
  id: string
  separator?: false
  label: string
  hint?: string
  keys?: string
  /** A page of the client. */
  href?: string
  icon?: ReactNode
  danger?: boolean
  isDisabled?: boolean
  onAction?: () => void
}

export interface MenuProps {
  /** The button that opens it. */
  trigger: ReactElement
  label: string
  items: readonly (MenuEntry | { id: string; separator: true })[]
}

export function Menu({ trigger, label, items }: MenuProps) {
  return (
    <MenuTrigger>
      {trigger}
      <Popover placement="bottom end" offset={6} className="min-w-56 rounded-md border border-line bg-sheet p-1 shadow-float">
        <AriaMenu aria-label={label} className="max-h-[70vh] overflow-y-auto outline-none">
          {items.map((item) =>
            item.separator ? (
              <Separator key={item.id} className="my-1 border-t border-line" />
            ) : (
              <MenuItem
                key={item.id}
                id={item.id}
                textValue={item.label}
                href={item.href}
                isDisabled={item.isDisabled}
                onAction={item.onAction}
                className={classNames(
                  'flex min-h-9 cursor-pointer items-center gap-3 rounded-sm px-3 py-1.5 no-underline outline-none data-disabled:opacity-50 data-focused:bg-well',
                  item.danger ? 'text-stop' : 'text-ink',
                )}
              >
                {item.icon}
                <span className="flex min-w-0 flex-1 flex-col">
                  <Text slot="label">{item.label}</Text>
                  {item.hint && (
                    <Text slot="description" className="text-xs text-muted">
                      {item.hint}
                    </Text>
                  )}
                </span>
                {item.keys && <KeyHint keys={item.keys} className="text-muted" />}
              </MenuItem>
            ),
          )}
        </AriaMenu>
      </Popover>
    </MenuTrigger>
  )
}
