import { Link } from './link.tsx'

export interface Crumb {
  label: string
  href?: string
}

/** The way down to here; the page itself is its heading and not repeated. */
export function Breadcrumbs({ items }: { items: readonly Crumb[] }) {
  return (
    <nav aria-label="Breadcrumbs">
      <ol className="flex flex-wrap items-center gap-x-1.5 text-sm text-muted">
        {items.map((item, index) => (
          <li key={`${item.label}-${index}`} className="flex items-center gap-x-1.5">
            {index > 0 && <span aria-hidden>›</span>}
            {item.href ? (
              <Link to={item.href} look="quiet" className="text-muted">
                {item.label}
              </Link>
            ) : (
              <span>{item.label}</span>
            )}
          </li>
        ))}
      </ol>
    </nav>
  )
}
