'use client'

import { sheetFile } from '@/lib/sheet/file'
import type { SheetSession } from '@/lib/sheet/session'
import { Button } from '../ui/button'

interface ExportButtonProps {
  readonly title: string
  readonly session: SheetSession
}

/** Saves the sheet as a file: formulas in people's names, the rig as `npm run evaluate` reads it. */
export function ExportButton({ title, session }: ExportButtonProps) {
  function save() {
    const text = JSON.stringify(sheetFile(session.getDefinition()), null, 2)
    const link = document.createElement('a')
    link.href = URL.createObjectURL(new Blob([text], { type: 'application/json' }))
    link.download = `${title.replace(/[^\p{L}\p{N}]+/gu, '-')}.json`
    link.click()
    URL.revokeObjectURL(link.href)
  }
  return (
    <Button look="dark" title="Save this sheet as a JSON file" onClick={save}>
      Export
    </Button>
  )
}
