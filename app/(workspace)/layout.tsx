import type { ReactNode } from 'react'
import { Providers } from './providers'

export default function WorkspaceLayout({ children }: { readonly children: ReactNode }) {
  return <Providers>{children}</Providers>
}
