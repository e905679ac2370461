import Link from 'next/link'

export default function NotFound() {
  return (
    <main className="mx-auto flex max-w-lg flex-col items-start gap-3 px-6 py-20">
      <h1 className="text-2xl font-bold">Nothing here</h1>
      <p>There is nothing at this address, or it is not yours to see.</p>
      <Link href="/" className="font-semibold text-petrol-light underline">
        To your workspace
      </Link>
    </main>
  )
}
