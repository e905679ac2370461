'use client'

interface ErrorPageProps {
  readonly error: Error & { readonly digest?: string }
  readonly retry: () => void
}

export default function ErrorPage({ error, retry }: ErrorPageProps) {
  return (
    <main className="mx-auto flex max-w-lg flex-col items-start gap-3 px-6 py-20">
      <h1 className="text-2xl font-bold">Something went wrong here</h1>
      <p>
        It is our fault, not yours, and nothing that was stored is lost.
        {error.digest && <> When you report it, name {error.digest}.</>}
      </p>
      <button type="button" className="rounded-md bg-mark px-3 py-1.5 font-semibold" onClick={retry}>
        Try again
      </button>
    </main>
  )
}
