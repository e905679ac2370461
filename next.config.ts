import type { NextConfig } from 'next'

const config: NextConfig = {
  reactStrictMode: true,
  poweredByHeader: false,
  // Packages that bring WebAssembly or machine code of their own, or that share state with the server in realtime/.
  serverExternalPackages: ['@electric-sql/pglite', '@node-rs/argon2', 'drizzle-orm', 'pino'],
  // forbidden() answers 403 with app/forbidden.tsx.
  experimental: { authInterrupts: true },
  // Types are checked by a check of their own (npm run types), which sees the tests and the server too.
  typescript: { ignoreBuildErrors: true },
  // Content-Security-Policy is in proxy.ts: it has a nonce for each answer.
  headers: async () => [
    {
      source: '/:path*',
      headers: [
        { key: 'X-Content-Type-Options', value: 'nosniff' },
        { key: 'X-Frame-Options', value: 'DENY' },
        { key: 'Referrer-Policy', value: 'same-origin' },
        { key: 'Cross-Origin-Opener-Policy', value: 'same-origin' },
        { key: 'Cross-Origin-Resource-Policy', value: 'same-origin' },
        { key: 'Permissions-Policy', value: 'camera=(), geolocation=(), microphone=(), payment=(), usb=()' },
      ],
    },
  ],
}

export default config
