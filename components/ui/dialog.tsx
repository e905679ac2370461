'use client'

import { Dialog as Radix } from 'radix-ui'
import type { ReactNode } from 'react'

interface DialogProps {
  readonly open: boolean
  readonly onClose: () => void
  readonly title: string
  readonly description?: string
  readonly wide?: boolean
  readonly children: ReactNode
}

export function Dialog({ open, onClose, title, description, wide = false, children }: DialogProps) {
  return (
    <Radix.Root open={open} onOpenChange={(next) => !next && onClose()}>
      <Radix.Portal>
        <Radix.Overlay className="fixed inset-0 z-[1100] bg-ink/40" />
        <Radix.Content
          className={`fixed left-1/2 top-[6vh] z-[1101] flex max-h-[88vh] w-[calc(100vw-24px)] -translate-x-1/2 flex-col overflow-hidden rounded-xl bg-white shadow-2xl ${wide ? 'max-w-3xl' : 'max-w-lg'}`}
          {...(description ? {} : { 'aria-describedby': undefined })}
        >
          <div className="flex items-start justify-between gap-4 border-b border-line px-5 py-3">
            <div>
              <Radix.Title className="text-base font-bold">{title}</Radix.Title>
              {description && <Radix.Description className="text-[13px] text-dim">{description}</Radix.Description>}
            </div>
            <Radix.Close className="rounded-md px-2 py-1 text-dim hover:bg-steel" aria-label="Close">
              ✕
            </Radix.Close>
          </div>
          <div className="overflow-y-auto px-5 py-4">{children}</div>
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  )
}
