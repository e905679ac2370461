'use client'

import { DropdownMenu } from 'radix-ui'
import type { ReactNode } from 'react'

export interface MenuItem {
  readonly label: string
  readonly onSelect: () => void
  readonly danger?: boolean
  readonly disabled?: boolean
}

interface MenuProps {
  readonly trigger: ReactNode
  readonly label: string
  readonly items: readonly MenuItem[]
}

/** A menu that opens from its trigger. */
export function Menu({ trigger, label, items }: MenuProps) {
  return (
    <DropdownMenu.Root>
      <DropdownMenu.Trigger asChild>{trigger}</DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          aria-label={label}
          align="end"
          sideOffset={4}
          className="z-[1200] min-w-44 rounded-lg border border-line bg-white p-1 shadow-lg"
        >
          {items.map((item) => (
            <DropdownMenu.Item
              key={item.label}
              disabled={item.disabled}
              onSelect={item.onSelect}
              className={`rounded-md px-3 py-1.5 outline-none data-[disabled]:opacity-40 data-[highlighted]:bg-steel ${item.danger ? 'text-hot' : ''}`}
            >
              {item.label}
            </DropdownMenu.Item>
          ))}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  )
}
