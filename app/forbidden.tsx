import Link from 'next/link'

export default function Forbidden() {
  return (
    <main>
      <h1>Not with your role</h1>
      <p>Your role in this workspace does not allow that. Ask a lead of the workspace.</p>
      <Link href="/">To your workspace</Link>
    </main>
  )
}
