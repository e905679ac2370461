'use client'

import { useMutation } from '@tanstack/react-query'
import { signOut } from 'next-auth/react'
import Link from 'next/link'
import { useRouter } from 'next/navigation'
import { useState } from 'react'
import type { FormEvent } from 'react'
import type { Answer } from '@/lib/auth/server/current'
import type { OpenedWorkspace } from '@/lib/workspace/server/open-workspace'
import type * as workspaceActions from '../actions'

interface WorkspaceScreenProps {
  readonly workspace: OpenedWorkspace
  readonly me: { readonly name: string; readonly initials: string }
  readonly actions: Pick<typeof workspaceActions, 'createProject' | 'createSheet' | 'renameSheet' | 'deleteSheet'>
}

/** Runs an action and shows the page anew; what is refused is thrown as an Error with the sentence to show. */
function useAction<Input, Output>(action: (input: Input) => Promise<Answer<Output>>) {
  const router = useRouter()
  return useMutation({
    mutationFn: async (input: Input) => {
      const result = await action(input)
      if (!result.ok) throw new Error(result.message)
      return result.value
    },
    onSuccess: () => router.refresh(),
  })
}

export function WorkspaceScreen({ workspace, me, actions }: WorkspaceScreenProps) {
  const createProject = useAction(actions.createProject)
  return (
    <main>
      <header>
        <h1>{workspace.name}</h1>
        <p>
          {me.name}, {workspace.role}
        </p>
        <button type="button" onClick={() => void signOut({ callbackUrl: '/sign-in' })}>
          Sign out
        </button>
      </header>
      {workspace.projects.map((project) => (
        <section key={project.id} id={project.id} aria-label={project.name}>
          <h2>{project.name}</h2>
          <ul>
            {project.sheets.map((sheet) => (
              <SheetItem key={sheet.id} sheet={sheet} can={workspace.can} actions={actions} />
            ))}
          </ul>
          {project.sheets.length === 0 && <p>No sheet here yet.</p>}
          {workspace.can.create && <NewSheet projectId={project.id} createSheet={actions.createSheet} />}
        </section>
      ))}
      {workspace.projects.length === 0 && <p>No project here yet.</p>}
      {workspace.can.create && (
        <NameForm
          label="New project"
          submit="Add project"
          error={createProject.error}
          busy={createProject.isPending}
          onName={(name) => createProject.mutateAsync({ workspaceId: workspace.workspaceId, name })}
        />
      )}
    </main>
  )
}

interface SheetItemProps {
  readonly sheet: OpenedWorkspace['projects'][number]['sheets'][number]
  readonly can: OpenedWorkspace['can']
  readonly actions: Pick<typeof workspaceActions, 'renameSheet' | 'deleteSheet'>
}

function SheetItem({ sheet, can, actions }: SheetItemProps) {
  const [renaming, setRenaming] = useState(false)
  const [deleting, setDeleting] = useState(false)
  const rename = useAction(actions.renameSheet)
  const remove = useAction(actions.deleteSheet)
  return (
    <li>
      <Link href={`/sheets/${sheet.id}`}>{sheet.title}</Link>
      <p>
        Changed by {sheet.changedBy}, <time dateTime={sheet.changedAt.toISOString()}>{shownDate(sheet.changedAt)}</time>
      </p>
      {can.rename && !renaming && (
        <button type="button" onClick={() => setRenaming(true)}>
          Rename
        </button>
      )}
      {renaming && (
        <NameForm
          label="New name"
          submit="Rename"
          initial={sheet.title}
          error={rename.error}
          busy={rename.isPending}
          onName={async (title) => {
            await rename.mutateAsync({ sheetId: sheet.id, title })
            setRenaming(false)
          }}
        />
      )}
      {can.delete && !deleting && (
        <button type="button" onClick={() => setDeleting(true)}>
          Delete
        </button>
      )}
      {deleting && (
        <p>
          Delete {sheet.title} for everyone?{' '}
          <button type="button" disabled={remove.isPending} onClick={() => remove.mutate({ sheetId: sheet.id })}>
            Delete it
          </button>
          <button type="button" onClick={() => setDeleting(false)}>
            Keep it
          </button>
        </p>
      )}
      {remove.error && <p role="alert">{remove.error.message}</p>}
    </li>
  )
}

interface NewSheetProps {
  readonly projectId: string
  readonly createSheet: typeof workspaceActions.createSheet
}

function NewSheet({ projectId, createSheet }: NewSheetProps) {
  const router = useRouter()
  const create = useAction(createSheet)
  return (
    <NameForm
      label="New sheet"
      submit="Add sheet"
      error={create.error}
      busy={create.isPending}
      onName={async (title) => {
        const { sheetId } = await create.mutateAsync({ projectId, title })
        router.push(`/sheets/${sheetId}`)
      }}
    />
  )
}

interface NameFormProps {
  readonly label: string
  readonly submit: string
  readonly initial?: string
  readonly error: Error | null
  readonly busy: boolean
  readonly onName: (name: string) => Promise<unknown>
}

function NameForm({ label, submit, initial = '', error, busy, onName }: NameFormProps) {
  const [name, setName] = useState(initial)
  function onSubmit(event: FormEvent) {
    event.preventDefault()
    // A refusal is shown from `error`.
    onName(name).then(
      () => setName(''),
      () => undefined,
    )
  }
  return (
    <form onSubmit={onSubmit}>
      <label>
        {label}
        <input required maxLength={120} value={name} onChange={(event) => setName(event.target.value)} />
      </label>
      <button type="submit" disabled={busy}>
        {submit}
      </button>
      {error && <p role="alert">{error.message}</p>}
    </form>
  )
}

/** The same on the server and in every browser, whatever its language and time zone. */
const shownDate = (date: Date) => date.toISOString().slice(0, 16).replace('T', ' ') + ' UTC'
