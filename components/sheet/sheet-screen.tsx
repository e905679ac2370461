'use client'

import { useEffect, useMemo, useState } from 'react'
import { scopeOf } from '@/lib/sheet/scope'
import { traceOf, usesOfThing } from '@/lib/sheet/trace'
import { RunPlots } from '../chart/run-plots'
import { SheetGrid } from '../grid/sheet-grid'
import type { GridEdit } from '../grid/sheet-grid'
import type { PeerMark } from '../grid/renderers'
import { TopBar } from '../layout/top-bar'
import type { Breadcrumb } from '../layout/top-bar'
import { RigPanel } from '../rig/rig-panel'
import { Avatar, PEOPLE_COLOURS } from '../ui/avatar'
import { Button } from '../ui/button'
import { Caution } from './caution'
import { ColumnTools } from './column-tools'
import { ExportButton } from './export-button'
import { FormulaLine } from './formula-line'
import type { Peer } from './live-connection'
import { LiveBanner, LivePill } from './live-pill'
import { PhoneSheet } from './phone-sheet'
import { ReadingPanel } from './reading-panel'
import { RowTools } from './row-tools'
import { sameSelection, selectedCell } from './selection'
import type { Selection } from './selection'
import { useLive, useOpenSheet, useView } from './use-open-sheet'
import type { OpenSheet } from './use-open-sheet'
import { useNarrow } from './use-narrow'

export interface SheetScreenProps {
  readonly sheetId: string
  readonly title: string
  readonly breadcrumbs: readonly Breadcrumb[]
  readonly me: { readonly id: string; readonly name: string; readonly initials: string; readonly role: string }
  readonly can: { readonly edit: boolean; readonly freeze: boolean; readonly comment: boolean }
  readonly handsontableLicenseKey: string
  readonly hyperformulaLicenseKey: string
}

export function SheetScreen(props: SheetScreenProps) {
  const open = useOpenSheet(props.sheetId, props.hyperformulaLicenseKey)
  if (!open) return <TopBar breadcrumbs={props.breadcrumbs} title={props.title} />
  return <OpenedSheet {...props} open={open} />
}

function OpenedSheet({
  open,
  title,
  breadcrumbs,
  me,
  can,
  handsontableLicenseKey,
}: SheetScreenProps & { readonly open: OpenSheet }) {
  const { session, connection } = open
  const view = useView(session)
  const live = useLive(connection)
  const narrow = useNarrow()
  const [selection, setSelection] = useState<Selection | null>(null)
  const [rowId, setRowId] = useState<string | null>(null)

  useEffect(() => connection.present(selection), [connection, selection])

  const definition = session.getDefinition()
  const scope = useMemo(() => scopeOf(definition), [definition])
  const selected = selectedCell(view, selection)
  const trace = useMemo(
    () => (selection && selected ? traceOf(definition, view, selection.row, selection.column) : null),
    // `selected` follows from the others
    // eslint-disable-next-line react-hooks/exhaustive-deps
    [definition, view, selection],
  )
  const peers = useMemo(() => peerMarks(live.peers), [live.peers])
  const run = runOf(view, rowId)

  function edit(edits: readonly GridEdit[]) {
    const cells: { row: string; column: string; typed: string }[] = []
    for (const { row, column, typed } of edits) {
      const id =
        row ??
        session.edits.addRow({ label: column === null ? typed : 'New state', from: view.rows.at(-1)?.id ?? null })
      if (column !== null) cells.push({ row: id, column, typed })
      else if (row !== null) session.edits.setRow(row, { label: typed })
    }
    if (cells.length > 0) session.edits.setCells(cells)
  }

  const bar = (
    <TopBar
      breadcrumbs={breadcrumbs}
      title={title}
      status={<LivePill live={live} working={view.working} />}
      actions={
        <>
          <div className="flex" aria-label="Who is here" role="group">
            <Avatar initials={me.initials} name={`${me.name} (you)`} colour={7} />
            {onePerPerson(live.peers).map((peer) => (
              <Avatar
                key={peer.user.id}
                initials={peer.user.initials}
                name={peer.user.name}
                colour={peer.user.colour}
              />
            ))}
          </div>
          <ExportButton title={title} session={session} />
        </>
      }
    />
  )

  if (!live.loaded) {
    return (
      <>
        {bar}
        <LiveBanner live={live} onDismiss={() => connection.dismissNotice()} />
        <p className="p-10 text-center text-dim">{live.status === 'closed' ? '' : 'Fetching the sheet …'}</p>
      </>
    )
  }
  if (narrow) {
    return (
      <>
        {bar}
        <LiveBanner live={live} onDismiss={() => connection.dismissNotice()} />
        <main className="flex-1 overflow-y-auto pb-3">
          <PhoneSheet view={view} />
          <div className="px-3">
            <Caution />
          </div>
        </main>
      </>
    )
  }
  return (
    <>
      {bar}
      <LiveBanner live={live} onDismiss={() => connection.dismissNotice()} />
      <div className="grid min-h-0 flex-1 grid-cols-[224px_minmax(0,1fr)] xl:grid-cols-[228px_minmax(0,1fr)_272px]">
        <aside aria-label="Rig" className="overflow-y-auto border-r border-line bg-white p-3">
          <RigPanel
            things={view.things}
            scope={scope}
            canEdit={can.edit}
            edits={session.edits}
            usesOf={(id) => usesOfThing(definition, id)}
          />
        </aside>
        <main className="flex min-h-0 min-w-0 flex-col gap-2 overflow-y-auto p-3">
          <div className="flex min-h-[240px] flex-1 flex-col overflow-hidden rounded-lg border border-line bg-white">
            <FormulaLine
              selected={selected}
              scope={scope}
              canEdit={can.edit}
              onCell={(typed) => selection && session.edits.setCell(selection.row, selection.column, typed)}
              onColumn={(formula) =>
                selection && session.edits.updateColumn(selection.column, { formula: formula || null })
              }
            />
            {can.edit && (
              <div className="flex flex-wrap items-center gap-x-4 gap-y-1.5 border-y border-line bg-[#F7F9F9] px-2.5 py-1.5">
                <RowTools view={view} rowId={rowId} edits={session.edits} onSelectRow={setRowId} />
                <ColumnTools view={view} columnId={selection?.column ?? null} scope={scope} edits={session.edits} />
                <div className="ml-auto flex gap-1.5">
                  <Button small title="Undo what you did (Ctrl Z)" onClick={() => session.undo()}>
                    Undo
                  </Button>
                  <Button small title="Redo (Ctrl Y)" onClick={() => session.redo()}>
                    Redo
                  </Button>
                </div>
              </div>
            )}
            <div className="min-h-0 flex-1">
              <SheetGrid
                view={view}
                canEdit={can.edit}
                licenseKey={handsontableLicenseKey}
                peers={peers}
                onEdit={edit}
                onSelect={(row, column) => {
                  setRowId(row)
                  // the grid says again where it stands whenever it is drawn: only another place is news
                  setSelection((before) => sameSelection(before, row && column ? { row, column } : null))
                }}
                onResize={(column, width) => session.edits.updateColumn(column, { width })}
                onUndo={() => session.undo()}
                onRedo={() => session.redo()}
              />
            </div>
          </div>
          <p className="text-[12px] text-dim">
            States hang from the one they start from. A pale yellow cell is typed, a white one is worked out, a dark
            corner marks a cell that overrides its column.
            {!can.edit && ' You read this sheet: it cannot be changed with your role.'}
          </p>
          {run && (
            <section aria-label="Course of the run" className="rounded-lg border border-line bg-white p-3">
              <RunPlots label={run.label} runKey={run.key} load={() => session.curves(run.row, run.column)} />
            </section>
          )}
          <Caution />
        </main>
        <aside aria-label="Reading" className="hidden overflow-y-auto border-l border-line bg-white p-3.5 xl:block">
          <ReadingPanel selected={selected} trace={trace} />
        </aside>
      </div>
    </>
  )
}

/** The run of the state one stands on: that of its first column of runs. */
function runOf(view: ReturnType<typeof useView>, rowId: string | null) {
  const row = view.rows.find((candidate) => candidate.id === rowId)
  const column = view.columns.find((candidate) => candidate.quantity === 'run')
  const value = row && column && view.cells.get(`${row.id}/${column.id}`)?.value
  return value?.kind === 'thing' ? { row: row!.id, column: column!.id, key: value.key, label: row!.label } : null
}

function peerMarks(peers: readonly Peer[]): ReadonlyMap<string, PeerMark> {
  return new Map(
    peers.flatMap(({ cell, user }) =>
      cell
        ? [
            [
              `${cell.row}/${cell.column}`,
              { initials: user.initials, name: user.name, colour: PEOPLE_COLOURS[user.colour % PEOPLE_COLOURS.length] },
            ] as const,
          ]
        : [],
    ),
  )
}

const onePerPerson = (peers: readonly Peer[]) => [...new Map(peers.map((peer) => [peer.user.id, peer])).values()]
