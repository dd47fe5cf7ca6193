import { zodResolver } from '@hookform/resolvers/zod'
import { Controller, useForm } from 'react-hook-form'
import { signInSchema, type Session, type SignIn } from '../../../core/schema/session.ts'
import { fieldError } from '../../api/client.ts'
import { useSignIn } from '../../api/session.ts'
import { Button } from '../../components/button.tsx'
import { ProblemNote } from '../../components/failed-state.tsx'
import { TextField } from '../../components/text-field.tsx'
import { DemonstrationAccounts } from './demonstration-accounts.tsx'

export interface SignInFormProps {
  /** Filled in already, when signing in again. */
  email?: string
  catalogueKind: Session['catalogue']['kind'] | null
  onDone: (session: Session) => void
}

/** E-mail address and password; pasting and password managers are welcome. */
export function SignInForm({ email = '', catalogueKind, onDone }: SignInFormProps) {
  const signIn = useSignIn()
  const form = useForm<SignIn>({ resolver: zodResolver(signInSchema), defaultValues: { email, password: '' } })
  const send = form.handleSubmit((values) => {
    signIn.mutate(values, {
      onSuccess: onDone,
      onError: () => {
        form.resetField('password')
        form.setFocus('password')
      },
    })
  })
  const { errors } = form.formState
  return (
    <form noValidate onSubmit={(event) => void send(event)} className="flex flex-col gap-4">
      <Controller
        control={form.control}
        name="email"
        render={({ field }) => (
          <TextField
            label="E-mail address"
            type="email"
            name={field.name}
            value={field.value}
            onChange={field.onChange}
            onBlur={field.onBlur}
            inputRef={field.ref}
            autoComplete="username"
            autoFocus={email === ''}
            error={errors.email?.message ?? fieldError(signIn.error, 'email')}
          />
        )}
      />
      <Controller
        control={form.control}
        name="password"
        render={({ field }) => (
          <TextField
            label="Password"
            type="password"
            name={field.name}
            value={field.value}
            onChange={field.onChange}
            onBlur={field.onBlur}
            inputRef={field.ref}
            autoComplete="current-password"
            autoFocus={email !== ''}
            error={errors.password?.message ?? fieldError(signIn.error, 'password')}
          />
        )}
      />
      <ProblemNote error={signIn.error} />
      <div>
        <Button type="submit" kind="primary" isPending={signIn.isPending}>
          Sign in
        </Button>
      </div>
      {catalogueKind === 'demonstration' && (
        <DemonstrationAccounts
          onChoose={(address) => {
            form.setValue('email', address, { shouldValidate: true })
            form.setFocus('password')
          }}
        />
      )}
    </form>
  )
}
