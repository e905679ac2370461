'use client'

import { signIn } from 'next-auth/react'
import { useState } from 'react'
import type { FormEvent } from 'react'
import { Mark } from '@/components/layout/mark'
import { Button } from '@/components/ui/button'
import { TextField } from '@/components/ui/field'

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
    <main className="grid min-h-dvh md:grid-cols-[minmax(0,5fr)_minmax(0,6fr)]">
      <div className="flex flex-col justify-between gap-8 bg-petrol px-6 py-8 text-white md:px-12 md:py-14">
        <p className="flex items-center gap-2.5 text-lg font-bold">
          <Mark /> Chargehand
        </p>
        <div className="max-w-md">
          <p className="text-2xl font-bold leading-snug md:text-3xl">
            How hot does it get, how cold, what pressure does it settle to, and how long does it take?
          </p>
          <p className="mt-4 text-white/80">
            A shared scenario sheet for teams that fill, vent and hold gas in pressure vessels: real-gas properties,
            units that are checked, every what-if side by side, reviewed and on record.
          </p>
        </div>
        <p className="hidden max-w-md text-[12.5px] text-white/70 md:block">
          A calculation aid. Relief, materials, oxygen cleanliness, asphyxiation and low-temperature embrittlement are
          for the applicable code and a licensed person to judge.
        </p>
      </div>
      <div className="flex flex-col justify-center gap-6 px-6 py-8 md:px-14">
        <div className="w-full max-w-md">
          <h1 className="mb-4 text-xl font-bold">Sign in to Chargehand</h1>
          <form onSubmit={submit} className="flex flex-col gap-4 rounded-xl border border-line bg-white p-5">
            <TextField
              label="E-mail"
              type="email"
              autoComplete="username"
              required
              value={email}
              onChange={(event) => setEmail(event.target.value)}
            />
            <TextField
              label="Password"
              type="password"
              autoComplete="current-password"
              required
              value={password}
              onChange={(event) => setPassword(event.target.value)}
            />
            {refused && (
              <p role="alert" className="rounded-md bg-hot-pale px-3 py-2 font-semibold text-hot-ink">
                {refused}
              </p>
            )}
            <Button type="submit" look="primary" disabled={busy}>
              Sign in
            </Button>
          </form>
        </div>
        {demo && (
          <section aria-label="Demo accounts" className="w-full max-w-md">
            <h2 className="text-[13px] font-bold text-dim">Demo</h2>
            <p className="mb-2 text-[13px] text-dim">
              Everyone in the demo is invented. Choose one; the password of all three is{' '}
              <code className="figures">{demo.password}</code>.
            </p>
            <ul className="flex flex-col gap-1.5">
              {demo.accounts.map((account) => (
                <li key={account.email}>
                  <button
                    type="button"
                    className="flex w-full flex-wrap items-baseline justify-between gap-x-3 rounded-lg border border-line bg-white px-3 py-2 text-left hover:border-petrol-light"
                    onClick={() => {
                      setEmail(account.email)
                      setPassword(demo.password)
                    }}
                  >
                    <span>
                      <b className="capitalize">{account.role}</b>: {account.name}
                    </span>{' '}
                    <span className="text-[12.5px] text-dim">{account.email}</span>
                  </button>
                </li>
              ))}
            </ul>
          </section>
        )}
      </div>
    </main>
  )
}
