import Link from 'next/link'

export default function Forbidden() {
  return (
    <main className="mx-auto flex max-w-lg flex-col items-start gap-3 px-6 py-20">
      <h1 className="text-2xl font-bold">Not with your role</h1>
      <p>Your role in this workspace does not allow that. Ask a lead of the workspace.</p>
      <Link href="/" className="font-semibold text-petrol-light underline">
        To your workspace
      </Link>
    </main>
  )
}
