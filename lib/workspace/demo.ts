import type { Role } from '@/lib/auth/policies'

/** The demo's accounts, one a role. All of it is invented; `.example` belongs to nobody. */
export const DEMO_ACCOUNTS: readonly { readonly role: Role; readonly name: string; readonly email: string }[] = [
  { role: 'lead', name: 'Isolde Carrow', email: 'lead@larkmoor.example' },
  { role: 'engineer', name: 'Dunstan Keel', email: 'engineer@larkmoor.example' },
  { role: 'viewer', name: 'Perrin Vane', email: 'viewer@larkmoor.example' },
]

/** Shown on the sign-in page while the demo is on; of no use while it is off. */
export const DEMO_PASSWORD = 'slow-fill-cool-shell'

export const DEMO_WORKSPACE = 'Larkmoor Test House'
export const DEMO_PROJECT = 'Nitrogen accumulators'
export const DEMO_SHEET = 'Bank A quick fill'
