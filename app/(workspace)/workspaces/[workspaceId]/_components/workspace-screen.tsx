'use client'

import { useMutation } from '@tanstack/react-query'
import { signOut } from 'next-auth/react'
import Link from 'next/link'
import { useRouter } from 'next/navigation'
import { useState } from 'react'
import type { FormEvent } from 'react'
import { TopBar } from '@/components/layout/top-bar'
import { Button } from '@/components/ui/button'
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
    <>
      <TopBar
        title={workspace.name}
        actions={
          <>
            <Link href="/fluids" className="font-semibold hover:underline">
              Fluids
            </Link>
            <span className="hidden text-white/80 sm:inline">
              {me.name}, {workspace.role}
            </span>
            <Button look="dark" onClick={() => void signOut({ callbackUrl: '/sign-in' })}>
              Sign out
            </Button>
          </>
        }
      />
      <main className="mx-auto flex max-w-4xl flex-col gap-6 px-4 py-6">
        {workspace.projects.map((project) => (
          <section key={project.id} id={project.id} aria-label={project.name}>
            <h2 className="mb-2 text-base font-bold">{project.name}</h2>
            <div className="overflow-hidden rounded-xl border border-line bg-white">
              <ul>
                {project.sheets.map((sheet) => (
                  <SheetItem key={sheet.id} sheet={sheet} can={workspace.can} actions={actions} />
                ))}
              </ul>
              {project.sheets.length === 0 && (
                <p className="px-4 py-5 text-dim">
                  No sheet here yet.
                  {workspace.can.create && ' Name the first one below: a fill, a let-down, a leak test.'}
                </p>
              )}
              {workspace.can.create && (
                <div className="border-t border-line bg-[#F7F9F9] px-4 py-3">
                  <NewSheet projectId={project.id} createSheet={actions.createSheet} />
                </div>
              )}
            </div>
          </section>
        ))}
        {workspace.projects.length === 0 && <p className="text-dim">No project here yet.</p>}
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
    </>
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
    <li className="flex flex-wrap items-center gap-x-3 gap-y-2 border-b border-line-light px-4 py-3 last:border-0">
      <div className="min-w-0 flex-1 basis-60">
        <Link href={`/sheets/${sheet.id}`} className="text-[15px] font-bold text-petrol-light hover:underline">
          {sheet.title}
        </Link>
        <p className="text-[12.5px] text-dim">
          Changed by {sheet.changedBy},{' '}
          <time dateTime={sheet.changedAt.toISOString()}>{shownDate(sheet.changedAt)}</time>
        </p>
      </div>
      {can.rename && !renaming && (
        <Button small onClick={() => setRenaming(true)}>
          Rename
        </Button>
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
        <Button small onClick={() => setDeleting(true)}>
          Delete
        </Button>
      )}
      {deleting && (
        <p className="flex flex-wrap items-center gap-2">
          Delete {sheet.title} for everyone?{' '}
          <Button small look="danger" disabled={remove.isPending} onClick={() => remove.mutate({ sheetId: sheet.id })}>
            Delete it
          </Button>
          <Button small onClick={() => setDeleting(false)}>
            Keep it
          </Button>
        </p>
      )}
      {remove.error && (
        <p role="alert" className="w-full font-semibold text-hot">
          {remove.error.message}
        </p>
      )}
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
    <form onSubmit={onSubmit} className="flex flex-wrap items-center gap-2">
      <label className="flex min-w-0 flex-1 basis-64 items-center gap-2">
        <span className="shrink-0 text-[13px] font-semibold">{label}</span>
        <input
          required
          maxLength={120}
          value={name}
          onChange={(event) => setName(event.target.value)}
          className="w-full min-w-0 rounded-md border border-line bg-white px-2.5 py-1.5"
        />
      </label>
      <Button type="submit" look="primary" disabled={busy}>
        {submit}
      </Button>
      {error && (
        <p role="alert" className="w-full font-semibold text-hot">
          {error.message}
        </p>
      )}
    </form>
  )
}

/** The same on the server and in every browser, whatever its language and time zone. */
const shownDate = (date: Date) => date.toISOString().slice(0, 16).replace('T', ' ') + ' UTC'
