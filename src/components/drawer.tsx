import { X } from 'lucide-react'
import type { ReactNode } from 'react'
import { Dialog as AriaDialog, Heading, Modal, ModalOverlay } from 'react-aria-components'
import { IconButton } from './icon-button.tsx'

export interface DrawerProps {
  title: string
  isOpen: boolean
  onOpenChange: (isOpen: boolean) => void
  children: ReactNode
  footer?: ReactNode
}

/** What stands beside the page on a wide screen, drawn over it on a narrow one. */
export function Drawer({ title, isOpen, onOpenChange, children, footer }: DrawerProps) {
  return (
    <ModalOverlay isOpen={isOpen} onOpenChange={onOpenChange} isDismissable className="fixed inset-0 z-50 flex bg-[rgb(8_12_20/0.5)]">
      <Modal className="h-full w-[min(22rem,92vw)] border-r border-line bg-sheet text-ink shadow-float">
        <AriaDialog className="flex h-full flex-col outline-none">
          <div className="flex items-center justify-between gap-4 border-b border-line px-4 py-3">
            <Heading slot="title" className="text-lg">
              {title}
            </Heading>
            <IconButton label="Close" size="small" icon={<X size={16} aria-hidden />} onPress={() => onOpenChange(false)} />
          </div>
          <div className="min-h-0 flex-1 overflow-y-auto px-4 py-3">{children}</div>
          {footer && <div className="flex flex-wrap justify-end gap-3 border-t border-line px-4 py-3">{footer}</div>}
        </AriaDialog>
      </Modal>
    </ModalOverlay>
  )
}
