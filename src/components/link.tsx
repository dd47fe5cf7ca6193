import type { AnchorHTMLAttributes, ReactNode } from 'react'
import { Link as RouterLink } from 'react-router-dom'
import { classNames } from '../lib/class-names.ts'
import { buttonLook } from './button.tsx'

type Look = 'text' | 'quiet' | 'button' | 'primary'

interface Common extends Omit<AnchorHTMLAttributes<HTMLAnchorElement>, 'href'> {
  /** `text`: underlined; `quiet`: underlined on hover only, for lists and tables; `button` and `primary`: as a button. */
  look?: Look
  children: ReactNode
}

export type LinkProps = Common & ({ to: string; href?: undefined } | { href: string; to?: undefined })

const LOOKS: Record<Look, string> = {
  text: 'text-accent underline decoration-1 underline-offset-3 hover:text-accent-strong hover:decoration-2',
  quiet: 'text-ink underline decoration-transparent decoration-1 underline-offset-3 hover:text-accent hover:decoration-current',
  button: classNames(buttonLook('quiet'), 'hover:border-ink hover:bg-well'),
  primary: classNames(buttonLook('primary'), 'hover:bg-accent-strong hover:border-accent-strong'),
}

/** A link: `to` for a page of the client, `href` for another site, the API or a download. */
export function Link({ look = 'text', className, to, href, children, ...rest }: LinkProps) {
  const looks = classNames(LOOKS[look], className)
  if (to !== undefined) {
    return (
      <RouterLink to={to} className={looks} {...rest}>
        {children}
      </RouterLink>
    )
  }
  const outside = /^https?:/.test(href)
  return (
    <a href={href} className={looks} rel={outside ? 'noopener' : undefined} {...rest}>
      {children}
    </a>
  )
}
