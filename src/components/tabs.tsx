import type { ReactNode } from 'react'
import { Tab, TabList, TabPanel, Tabs as AriaTabs } from 'react-aria-components'

export interface TabDefinition {
  id: string
  label: ReactNode
  content: ReactNode
}

export interface TabsProps {
  label: string
  tabs: readonly TabDefinition[]
  selected?: string
  onSelect?: (id: string) => void
}

export function Tabs({ label, tabs, selected, onSelect }: TabsProps) {
  return (
    <AriaTabs selectedKey={selected} onSelectionChange={(key) => onSelect?.(String(key))}>
      <TabList aria-label={label} className="flex gap-6 overflow-x-auto border-b border-line">
        {tabs.map((tab) => (
          <Tab
            key={tab.id}
            id={tab.id}
            className="-mb-px cursor-pointer border-b-2 border-transparent py-2 whitespace-nowrap text-muted data-focus-visible:-outline-offset-2 data-hovered:text-ink data-selected:border-accent data-selected:font-semibold data-selected:text-ink"
          >
            {tab.label}
          </Tab>
        ))}
      </TabList>
      {tabs.map((tab) => (
        <TabPanel key={tab.id} id={tab.id} className="pt-5">
          {tab.content}
        </TabPanel>
      ))}
    </AriaTabs>
  )
}
