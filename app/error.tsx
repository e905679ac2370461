'use client'

interface ErrorPageProps {
  readonly error: Error & { readonly digest?: string }
  readonly retry: () => void
}

export default function ErrorPage({ error, retry }: ErrorPageProps) {
  return (
    <main>
      <h1>Something went wrong here</h1>
      <p>
        It is our fault, not yours, and nothing that was stored is lost.
        {error.digest && <> When you report it, name {error.digest}.</>}
      </p>
      <button type="button" onClick={retry}>
        Try again
      </button>
    </main>
  )
}
