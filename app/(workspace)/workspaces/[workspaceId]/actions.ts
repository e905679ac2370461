'use server'

import { answer } from '@/lib/auth/server/current'
import * as project from '@/lib/workspace/server/create-project'
import * as create from '@/lib/workspace/server/create-sheet'
import * as remove from '@/lib/workspace/server/delete-sheet'
import * as rename from '@/lib/workspace/server/rename-sheet'

export async function createProject(input: { readonly workspaceId: string; readonly name: string }) {
  return answer(project.createProject, input)
}

export async function createSheet(input: { readonly projectId: string; readonly title: string }) {
  return answer(create.createSheet, input)
}

export async function renameSheet(input: { readonly sheetId: string; readonly title: string }) {
  return answer(rename.renameSheet, input)
}

export async function deleteSheet(input: { readonly sheetId: string }) {
  return answer(remove.deleteSheet, input)
}
