import { notify } from '../components/toast.tsx'

/**
 * Copies text and says so; where the browser refuses, says what to do instead.
 *
 * @param what - named in the notice: "the table, 412 rows"
 */
export async function copyText(text: string, what: string): Promise<boolean> {
  try {
    await navigator.clipboard.writeText(text)
    notify(`Copied ${what}.`, { tone: 'good', seconds: 3 })
    return true
  } catch {
    notify('The browser did not allow copying. Select the text and copy it by hand.', { tone: 'caution' })
    return false
  }
}
