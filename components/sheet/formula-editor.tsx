'use client'

import {
  acceptCompletion,
  autocompletion,
  completionKeymap,
  completionStatus,
  moveCompletionSelection,
} from '@codemirror/autocomplete'
import type { CompletionContext, CompletionResult } from '@codemirror/autocomplete'
import { defaultKeymap, history, historyKeymap } from '@codemirror/commands'
import { HighlightStyle, LRLanguage, LanguageSupport, syntaxHighlighting } from '@codemirror/language'
import { linter } from '@codemirror/lint'
import { Compartment, EditorState } from '@codemirror/state'
import { EditorView, keymap } from '@codemirror/view'
import { tags } from '@lezer/highlight'
import { useEffect, useRef } from 'react'
import { analyse, callAt, complete, highlightedParser } from '@/lib/formula'
import type { CallAt, Expectation, Scope } from '@/lib/formula'
import { VOCABULARY } from '@/lib/sheet/engine/vocabulary'

const language = new LanguageSupport(LRLanguage.define({ name: 'formula', parser: highlightedParser }))

const colours = HighlightStyle.define([
  { tag: tags.function(tags.name), color: '#13596B', fontWeight: '650' },
  { tag: tags.propertyName, color: '#53646E' },
  { tag: tags.attributeName, color: '#13596B' },
  { tag: tags.variableName, color: '#6A2C91' },
  { tag: tags.labelName, color: '#8A5BAF' },
  { tag: tags.unit, color: '#7A4F00', backgroundColor: '#FFF5D6', borderRadius: '3px' },
  { tag: tags.string, color: '#2E6B47' },
])

const look = EditorView.theme({
  '&': { fontSize: '14px' },
  '&.cm-focused': { outline: 'none' },
  '.cm-content': { fontFamily: '"Atkinson Hyperlegible Mono Variable", monospace', padding: '2px 0' },
  '.cm-line': { padding: '0 2px' },
  '.cm-tooltip': { border: '1px solid #D6DDE0', borderRadius: '8px', overflow: 'hidden' },
  '.cm-tooltip-autocomplete > ul > li': { padding: '3px 8px' },
  '.cm-completionDetail': { color: '#53646E', fontStyle: 'normal', marginLeft: '1em' },
})

export interface FormulaEditorProps {
  readonly text: string
  readonly readOnly: boolean
  readonly label: string
  readonly scope: Scope
  /** What the formula has to give; null checks nothing (a text that is no formula). */
  readonly expectation: Expectation | null
  readonly onCommit: (text: string) => void
  readonly onCancel: () => void
  /** The call that the cursor is in, for the line that explains its arguments. */
  readonly onCall?: (call: CallAt | null) => void
}

/** One line of formula: colours, completion, mistakes at their place. Enter commits, Escape reverts. */
export function FormulaEditor(props: FormulaEditorProps) {
  const host = useRef<HTMLDivElement>(null)
  const view = useRef<EditorView>(null)
  const latest = useRef(props)
  const access = useRef(new Compartment())
  useEffect(() => {
    latest.current = props
  })

  useEffect(() => {
    const parent = host.current
    if (!parent) return
    const editor = new EditorView({ parent, state: createState(latest, access.current) })
    view.current = editor
    return () => editor.destroy()
  }, [])

  useEffect(() => {
    const editor = view.current
    if (!editor || editor.state.doc.toString() === props.text) return
    editor.dispatch({ changes: { from: 0, to: editor.state.doc.length, insert: props.text } })
  }, [props.text])

  useEffect(() => {
    view.current?.dispatch({ effects: access.current.reconfigure(EditorState.readOnly.of(props.readOnly)) })
  }, [props.readOnly])

  return <div ref={host} className="min-w-0 flex-1" data-testid="formula-editor" />
}

interface Latest {
  readonly current: FormulaEditorProps
}

function createState(latest: Latest, access: Compartment): EditorState {
  const commit = (view: EditorView) => {
    latest.current.onCommit(view.state.doc.toString())
    return true
  }
  const cancel = (view: EditorView) => {
    view.dispatch({ changes: { from: 0, to: view.state.doc.length, insert: latest.current.text } })
    latest.current.onCancel()
    return true
  }
  return EditorState.create({
    doc: latest.current.text,
    extensions: [
      language,
      syntaxHighlighting(colours),
      look,
      history(),
      // nothing is chosen by itself: Enter after a whole formula commits it, whether or not the list has come up
      autocompletion({ override: [(context) => completions(context, latest)], icons: false, selectOnOpen: false }),
      keymap.of([
        ...completionKeymap,
        { key: 'Tab', run: completeFirst },
        { key: 'Enter', run: commit },
        { key: 'Escape', run: cancel },
        ...historyKeymap,
        ...defaultKeymap,
      ]),
      linter((view) => mistakes(view, latest), { delay: 300 }),
      // a formula is one line, whatever is pasted
      EditorState.transactionFilter.of((transaction) => (transaction.newDoc.lines > 1 ? [] : transaction)),
      EditorView.lineWrapping,
      EditorView.contentAttributes.of({ 'aria-label': latest.current.label }),
      access.of(EditorState.readOnly.of(latest.current.readOnly)),
      EditorView.updateListener.of((update) => {
        if (!update.selectionSet && !update.docChanged && !update.focusChanged) return
        const { state, hasFocus } = update.view
        latest.current.onCall?.(hasFocus ? callAt(state.doc.toString(), state.selection.main.head, VOCABULARY) : null)
      }),
    ],
  })
}

const takeNext = moveCompletionSelection(true)

/** Tab takes what is chosen in the list, or else its first entry; with no list it moves on, as everywhere. */
function completeFirst(view: EditorView): boolean {
  if (completionStatus(view.state) !== 'active') return false
  return acceptCompletion(view) || (takeNext(view) && acceptCompletion(view))
}

function completions(context: CompletionContext, { current: { scope, expectation } }: Latest): CompletionResult | null {
  if (!expectation) return null
  const word = context.matchBefore(/[\p{L}_0-9]+|[.@:]|\d\s/u)
  if (!word && !context.explicit) return null
  const { from, options } = complete(context.state.doc.toString(), context.pos, scope, VOCABULARY)
  return {
    from,
    options: options.map(({ label, apply, kind, detail }, i) => ({ label, apply, type: kind, detail, boost: -i / 10 })),
    validFor: /^[\p{L}_0-9]*$/u,
  }
}

function mistakes(view: EditorView, { current: { scope, expectation } }: Latest) {
  const text = view.state.doc.toString()
  if (!expectation || text.trim() === '') return []
  return analyse(text, scope, VOCABULARY, expectation).map(({ span, reason }) => ({
    from: Math.min(span.from, text.length),
    to: Math.min(Math.max(span.to, span.from + 1), text.length),
    severity: 'error' as const,
    message: reason,
  }))
}
