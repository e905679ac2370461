'use client'

import { signIn } from 'next-auth/react'
import { useState } from 'react'
import type { FormEvent } from 'react'

export interface DemoAccounts {
  readonly accounts: readonly { readonly role: string; readonly name: string; readonly email: string }[]
  readonly password: string
}

interface SignInFormProps {
  /** The path to go on to. */
  readonly destination: string
  /** The demo's accounts while the demo is on. */
  readonly demo: DemoAccounts | null
}

const REFUSED: Readonly<Record<string, string>> = {
  CredentialsSignin: 'That e-mail and password do not belong together.',
  TooManyAttempts: 'Too many attempts from here. Wait ten minutes and try again.',
}
const UNKNOWN = 'Signing in did not work. Try again in a moment.'

export function SignInForm({ destination, demo }: SignInFormProps) {
  const [email, setEmail] = useState('')
  const [password, setPassword] = useState('')
  const [refused, setRefused] = useState<string | null>(null)
  const [busy, setBusy] = useState(false)

  async function submit(event: FormEvent) {
    event.preventDefault()
    setBusy(true)
    setRefused(null)
    const result = await signIn('credentials', { email, password, redirect: false }).catch(() => undefined)
    // A whole page load: the server then works everything out with the new session.
    if (result?.ok) return window.location.assign(destination)
    setBusy(false)
    setRefused(REFUSED[result?.error ?? ''] ?? UNKNOWN)
  }

  return (
    <main>
      <h1>Sign in to Chargehand</h1>
      <form onSubmit={submit}>
        <label>
          E-mail
          <input
            type="email"
            autoComplete="username"
            required
            value={email}
            onChange={(event) => setEmail(event.target.value)}
          />
        </label>
        <label>
          Password
          <input
            type="password"
            autoComplete="current-password"
            required
            value={password}
            onChange={(event) => setPassword(event.target.value)}
          />
        </label>
        {refused && <p role="alert">{refused}</p>}
        <button type="submit" disabled={busy}>
          Sign in
        </button>
      </form>
      {demo && (
        <section aria-label="Demo accounts">
          <h2>Demo</h2>
          <p>
            Everyone in the demo is invented. The password of all three is <code>{demo.password}</code>.
          </p>
          <ul>
            {demo.accounts.map((account) => (
              <li key={account.email}>
                <button
                  type="button"
                  onClick={() => {
                    setEmail(account.email)
                    setPassword(demo.password)
                  }}
                >
                  {account.role}: {account.name}, {account.email}
                </button>
              </li>
            ))}
          </ul>
        </section>
      )}
    </main>
  )
}
