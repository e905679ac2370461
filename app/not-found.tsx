import Link from 'next/link'

export default function NotFound() {
  return (
    <main>
      <h1>Nothing here</h1>
      <p>There is nothing at this address, or it is not yours to see.</p>
      <Link href="/">To your workspace</Link>
    </main>
  )
}
