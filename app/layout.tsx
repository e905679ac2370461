import '@fontsource-variable/atkinson-hyperlegible-mono'
import '@fontsource-variable/atkinson-hyperlegible-next'
import type { Metadata, Viewport } from 'next'
import { headers } from 'next/headers'
import type { ReactNode } from 'react'
import './globals.css'

export const metadata: Metadata = {
  title: { default: 'Chargehand', template: '%s · Chargehand' },
  description: 'A shared scenario sheet for teams that fill, vent and hold gas in pressure vessels',
  icons: { icon: '/icon.svg' },
}

export const viewport: Viewport = { themeColor: '#0C3F4D', width: 'device-width', initialScale: 1 }

export default async function RootLayout({ children }: { readonly children: ReactNode }) {
  // The security policy has a nonce for each answer, so no page is made ahead of its request.
  await headers()
  return (
    <html lang="en">
      <body>{children}</body>
    </html>
  )
}
