import { NextResponse } from 'next/server'
import type { NextRequest } from 'next/server'

/*
 * Scripts run only with the nonce of their answer, or from our own files; nothing is loaded from elsewhere. Styles may
 * stand in the page: the grid and the charts place what they draw with style attributes.
 */
function policyOf(nonce: string): string {
  const development = process.env.NODE_ENV === 'development'
  const encrypted = process.env.NEXTAUTH_URL?.startsWith('https://') ?? false
  return [
    "default-src 'self'",
    // React rebuilds the server's stack traces with eval in development, and only there.
    `script-src 'self' 'nonce-${nonce}'${development ? " 'unsafe-eval'" : ''}`,
    "style-src 'self' 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "font-src 'self'",
    "connect-src 'self'",
    "worker-src 'self' blob:",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
    ...(encrypted ? ['upgrade-insecure-requests'] : []),
  ].join('; ')
}

export function proxy(request: NextRequest): NextResponse {
  const policy = policyOf(crypto.randomUUID())
  const headers = new Headers(request.headers)
  // Next reads the nonce from the request's policy and puts it on every script of the page.
  headers.set('Content-Security-Policy', policy)
  const response = NextResponse.next({ request: { headers } })
  response.headers.set('Content-Security-Policy', policy)
  if (process.env.NEXTAUTH_URL?.startsWith('https://')) {
    response.headers.set('Strict-Transport-Security', 'max-age=31536000')
  }
  return response
}

export const config = { matcher: ['/((?!_next/static|_next/image).*)'] }
