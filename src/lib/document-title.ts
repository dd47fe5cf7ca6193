import { useEffect } from 'react'

/** The tab's title while the calling page is shown: "Ostrel IX · Vicinage". An empty title leaves the name alone. */
export function useDocumentTitle(title: string): void {
  useEffect(() => {
    document.title = title ? `${title} · Vicinage` : 'Vicinage'
  }, [title])
}
