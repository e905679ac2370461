import type { LiveState } from './live-connection'

const WORDS = {
  connecting: 'Connecting …',
  live: 'Live, all changes saved',
  offline: 'Offline',
  closed: 'Closed',
} as const

/** Whether what one sees is what all see, and what one did is kept. */
export function LivePill({ live, working }: { readonly live: LiveState; readonly working: boolean }) {
  const saving = live.status === 'live' && live.unsaved > 0
  const words = saving ? 'Saving …' : WORDS[live.status]
  return (
    <span role="status" className="rounded-full border border-white/30 px-2.5 py-0.5 text-[12px]">
      <span
        aria-hidden="true"
        className={`mr-1.5 inline-block size-2 rounded-full ${live.status === 'live' ? 'bg-[#7BD3A2]' : 'bg-mark'}`}
      />
      {words}
      {working && ' · working out'}
    </span>
  )
}

/** Across the page while the line is down, or when the server said no. */
export function LiveBanner({ live, onDismiss }: { readonly live: LiveState; readonly onDismiss: () => void }) {
  if (live.status === 'closed') {
    return <Banner>{live.notice} What you see may be out of date: load the page anew.</Banner>
  }
  if (live.status === 'offline') {
    return (
      <Banner>
        The connection is lost. Go on working: your changes are kept in this page
        {live.unsaved > 0 ? ` (${live.unsaved} so far)` : ''} and join the sheet when it is back. Do not close the page
        until then.
      </Banner>
    )
  }
  if (!live.notice) return null
  return (
    <Banner>
      {live.notice} What you changed is seen by you alone: load the page anew.
      <button type="button" className="ml-3 underline" onClick={onDismiss}>
        Understood
      </button>
    </Banner>
  )
}

const Banner = ({ children }: { readonly children: React.ReactNode }) => (
  <p role="alert" className="border-b border-mark bg-mark-soft px-4 py-2 text-mark-ink">
    {children}
  </p>
)
