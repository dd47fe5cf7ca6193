import { X } from 'lucide-react'
import type { ReactNode } from 'react'
import { Dialog as AriaDialog, Heading, Modal, ModalOverlay } from 'react-aria-components'
import { classNames } from '../lib/class-names.ts'
import { IconButton } from './icon-button.tsx'

export interface DialogProps {
  title: string
  isOpen: boolean
  onOpenChange: (isOpen: boolean) => void
  children: ReactNode
  /** The buttons, the main one last. */
  footer?: ReactNode
  size?: 'small' | 'medium' | 'large'
  /** For what interrupts and must be answered; a click beside does not close it. */
  role?: 'dialog' | 'alertdialog'
}

const WIDTHS = { small: 'max-w-md', medium: 'max-w-xl', large: 'max-w-4xl' } as const

export function Dialog({ title, isOpen, onOpenChange, children, footer, size = 'medium', role = 'dialog' }: DialogProps) {
  return (
    <ModalOverlay
      isOpen={isOpen}
      onOpenChange={onOpenChange}
      isDismissable={role === 'dialog'}
      className="fixed inset-0 z-50 flex items-start justify-center overflow-y-auto bg-[rgb(8_12_20/0.5)] px-4 py-[10vh]"
    >
      <Modal className={classNames('w-full rounded-lg border border-line bg-sheet text-ink shadow-float', WIDTHS[size])}>
        <AriaDialog role={role} className="flex flex-col gap-4 p-6 outline-none">
          <div className="flex items-start justify-between gap-4">
            <Heading slot="title" className="text-lg">
              {title}
            </Heading>
            <IconButton label="Close" size="small" icon={<X size={16} aria-hidden />} onPress={() => onOpenChange(false)} className="-mt-0.5 -mr-2" />
          </div>
          {children}
          {footer && <div className="flex flex-wrap justify-end gap-3 pt-2">{footer}</div>}
        </AriaDialog>
      </Modal>
    </ModalOverlay>
  )
}
