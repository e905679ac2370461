import NextAuth from 'next-auth'
import type { NextRequest } from 'next/server'
import { authOptions } from '@/lib/auth/server/next-auth'

interface Context {
  readonly params: Promise<{ nextauth: string[] }>
}

// The options are read with each request: the secret is not there while the app is being built.
const handle = (request: NextRequest, context: Context) => NextAuth(request as never, context as never, authOptions())

export { handle as GET, handle as POST }
