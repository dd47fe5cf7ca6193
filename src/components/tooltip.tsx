import type { ReactElement } from 'react'
import { Tooltip as AriaTooltip, TooltipTrigger } from 'react-aria-components'
import { KeyHint } from './key-hint.tsx'

export interface TooltipProps {
  text: string
  keys?: string
  /** One focusable React Aria element; wrap anything else in `Focusable`. */
  children: ReactElement
  placement?: 'top' | 'bottom' | 'left' | 'right'
}

/** A word on hover and focus: closes on Escape, stays while pointed at. Never the only place of something needed. */
export function Tooltip({ text, keys, children, placement = 'top' }: TooltipProps) {
  return (
    <TooltipTrigger delay={500} closeDelay={150}>
      {children}
      <AriaTooltip offset={6} placement={placement} className="max-w-72 rounded-md bg-ink px-2.5 py-1.5 font-sans text-xs text-paper shadow-float">
        {text}
        {keys && <KeyHint keys={keys} className="ml-2" />}
      </AriaTooltip>
    </TooltipTrigger>
  )
}
