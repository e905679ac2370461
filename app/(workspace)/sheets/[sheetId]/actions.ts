'use server'

import { answer } from '@/lib/auth/server/current'
import * as sheet from '@/lib/workspace/server/rename-sheet'

export async function renameSheet(sheetId: string, title: string) {
  return answer(sheet.renameSheet, { sheetId, title })
}
