import { Search } from 'lucide-react'
import { useState } from 'react'
import { Autocomplete, Dialog, Header, Input, Menu, MenuItem, MenuSection, Modal, ModalOverlay, SearchField, Text } from 'react-aria-components'
import { useNavigate } from 'react-router-dom'
import { useResolve } from '../api/resolve.ts'
import { useSession } from '../api/session.ts'
import { ClassMark } from '../components/class-mark.tsx'
import { KeyHint } from '../components/key-hint.tsx'
import { useSettled } from '../lib/use-settled.ts'
import { useAvailableActions } from './actions/use-actions.ts'
import { PAGES } from './pages.ts'
import { paletteGroups, type PaletteEntry } from './palette-entries.ts'

const TYPING_PAUSE_MS = 120

export interface CommandPaletteProps {
  isOpen: boolean
  onOpenChange: (isOpen: boolean) => void
}

/** Finds any galaxy by any of its names, any page, any action; by keyboard all the way. */
export default function CommandPalette({ isOpen, onOpenChange }: CommandPaletteProps) {
  return (
    <ModalOverlay isOpen={isOpen} onOpenChange={onOpenChange} isDismissable className="fixed inset-0 z-50 flex items-start justify-center bg-[rgb(8_12_20/0.5)] px-4 pt-[12vh]">
      <Modal className="w-full max-w-xl overflow-hidden rounded-lg border border-line bg-sheet text-ink shadow-float">
        <Dialog aria-label="Find a galaxy, a page or an action" className="outline-none">
          <PaletteContent onDone={() => onOpenChange(false)} />
        </Dialog>
      </Modal>
    </ModalOverlay>
  )
}

function PaletteContent({ onDone }: { onDone: () => void }) {
  const [typed, setTyped] = useState('')
  const navigate = useNavigate()
  const { permissions } = useSession()
  const actions = useAvailableActions()
  const found = useResolve(useSettled(typed, TYPING_PAUSE_MS))
  const pages = PAGES.filter((page) => !page.needs || permissions.includes(page.needs))
  const matches = typed.trim().length >= 2 ? (found.data?.matches ?? []) : []
  const groups = paletteGroups(typed, matches, pages, actions)
  const isLooking = found.isFetching && matches.length === 0

  function choose(entry: PaletteEntry): void {
    onDone()
    // After the dialog has given the focus back, so that what the action opens may take it.
    requestAnimationFrame(() => {
      if ('to' in entry.go) void navigate(entry.go.to)
      else entry.go.perform()
    })
  }

  const nothing = isLooking ? 'Looking …' : found.isError && typed.trim().length >= 2 ? 'Galaxies cannot be looked up now: the server does not answer.' : 'Nothing by that name. Try another of its designations, or part of one.'
  return (
    <Autocomplete inputValue={typed} onInputChange={setTyped}>
      <SearchField aria-label="Find a galaxy, a page or an action" autoFocus className="flex items-center border-b border-line">
        <Search size={18} aria-hidden className="ml-4 shrink-0 text-muted" />
        <Input placeholder="Find a galaxy by any name, a page, an action" className="h-12 min-w-0 flex-1 bg-transparent px-3 text-base outline-none [&::-webkit-search-cancel-button]:hidden" />
      </SearchField>
      <Menu
        aria-label="Found"
        onAction={(key) => {
          const entry = groups.flatMap((group) => group.entries).find((candidate) => candidate.id === key)
          if (entry) choose(entry)
        }}
        renderEmptyState={() => <p className="px-4 py-6 text-muted">{nothing}</p>}
        className="max-h-[55vh] min-h-24 overflow-y-auto p-2 outline-none"
      >
        {groups.map((group) => (
          <MenuSection key={group.title} id={group.title}>
            <Header className="px-3 pt-2 pb-1 text-xs text-muted">{group.title}</Header>
            {group.entries.map((entry) => (
              <MenuItem key={entry.id} id={entry.id} textValue={entry.label} className="flex min-h-9 cursor-pointer items-center gap-3 rounded-sm px-3 py-1 outline-none data-focused:bg-well">
                {entry.galaxyClass && <ClassMark galaxyClass={entry.galaxyClass} />}
                <Text slot="label">{entry.label}</Text>
                {entry.hint && (
                  <Text slot="description" className="min-w-0 flex-1 truncate text-muted">
                    {entry.hint}
                  </Text>
                )}
                {entry.keys && <KeyHint keys={entry.keys} className="ml-auto text-muted" />}
              </MenuItem>
            ))}
          </MenuSection>
        ))}
      </Menu>
    </Autocomplete>
  )
}
