import { Button } from '../../components/button.tsx'

/** The people of the demonstration and what each may do; made by the demonstration's seed. */
const ACCOUNTS = [
  { email: 'curator@demo.vicinage.test', role: 'Curator', may: 'writes submissions and imports tables' },
  { email: 'approver@demo.vicinage.test', role: 'Approver', may: 'reviews what others submitted' },
  { email: 'researcher@demo.vicinage.test', role: 'Researcher', may: 'reads the current revision, not only releases' },
  { email: 'outreach@demo.vicinage.test', role: 'Outreach', may: 'keeps figures' },
  { email: 'steward@demo.vicinage.test', role: 'Steward', may: 'sets the scale and publishes releases' },
] as const

/** Fills in the address of one of them. The password was printed when the demonstration was started; this page does not know it. */
export function DemonstrationAccounts({ onChoose }: { onChoose: (email: string) => void }) {
  return (
    <section aria-labelledby="demonstration-accounts" className="border-t border-line pt-4">
      <h2 id="demonstration-accounts" className="text-base">
        Accounts of the demonstration
      </h2>
      <p className="mt-1 text-muted">Choose one to fill in its address. The password stands in the terminal where the demonstration was started.</p>
      <ul className="mt-2">
        {ACCOUNTS.map((account) => (
          <li key={account.email} className="flex min-h-10 items-center justify-between gap-4 border-b border-line py-1">
            <span>
              <span className="font-medium">{account.role}</span> <span className="text-muted">{account.may}</span>
            </span>
            <Button size="small" aria-label={`Fill in the address of the ${account.role.toLowerCase()}`} onPress={() => onChoose(account.email)}>
              Fill in
            </Button>
          </li>
        ))}
      </ul>
    </section>
  )
}
