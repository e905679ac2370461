import Link from 'next/link'
import type { ReactNode } from 'react'
import { Mark } from './mark'

export interface Breadcrumb {
  readonly label: string
  readonly href: string
}

interface TopBarProps {
  readonly breadcrumbs?: readonly Breadcrumb[]
  readonly title: ReactNode
  /** Beside the title. */
  readonly status?: ReactNode
  readonly actions?: ReactNode
}

export function TopBar({ breadcrumbs = [], title, status, actions }: TopBarProps) {
  return (
    <header className="on-petrol flex min-h-[52px] flex-wrap items-center gap-x-3 gap-y-1 bg-petrol px-4 py-2 text-white">
      <Link href="/" className="flex items-center gap-2.5 font-bold" aria-label="Chargehand, to your workspace">
        <Mark />
        <span className="hidden sm:inline">Chargehand</span>
      </Link>
      {breadcrumbs.length > 0 && (
        <nav aria-label="Where this is" className="hidden text-white/80 md:block">
          {breadcrumbs.map((crumb) => (
            <span key={crumb.href}>
              <Link href={crumb.href} className="hover:underline">
                {crumb.label}
              </Link>
              <span className="px-1.5 text-white/50">/</span>
            </span>
          ))}
        </nav>
      )}
      <h1 className="min-w-0 truncate text-[15px] font-bold">{title}</h1>
      {status}
      <div className="ml-auto flex items-center gap-2.5">{actions}</div>
    </header>
  )
}
