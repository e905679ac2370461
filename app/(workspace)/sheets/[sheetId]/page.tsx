import type { Metadata } from 'next'
import { cache } from 'react'
import { SheetScreen } from '@/components/sheet'
import { initialsOf } from '@/lib/auth/initials'
import { currentActor, orRefuse } from '@/lib/auth/server/current'
import { environment } from '@/lib/env'
import { openSheet } from '@/lib/workspace/server/open-sheet'

interface SheetPageProps {
  readonly params: Promise<{ sheetId: string }>
}

const load = cache(async (sheetId: string) =>
  orRefuse(openSheet(await currentActor(), { sheetId }), `/sheets/${sheetId}`),
)

export async function generateMetadata({ params }: SheetPageProps): Promise<Metadata> {
  return { title: (await load((await params).sheetId)).sheet.title }
}

export default async function SheetPage({ params }: SheetPageProps) {
  const { sheet, me, can } = await load((await params).sheetId)
  const { handsontableLicenseKey, hyperformulaLicenseKey } = environment()
  return (
    <SheetScreen
      sheetId={sheet.id}
      title={sheet.title}
      breadcrumbs={[
        { label: sheet.workspaceName, href: `/workspaces/${sheet.workspaceId}` },
        { label: sheet.projectName, href: `/workspaces/${sheet.workspaceId}#${sheet.projectId}` },
      ]}
      me={{ ...me, initials: initialsOf(me.name) }}
      can={can}
      handsontableLicenseKey={handsontableLicenseKey}
      hyperformulaLicenseKey={hyperformulaLicenseKey}
    />
  )
}
