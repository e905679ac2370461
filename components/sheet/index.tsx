'use client'

import dynamic from 'next/dynamic'
import { TopBar } from '../layout/top-bar'
import type { SheetScreenProps } from './sheet-screen'

/** Grid, editor and engine are fetched only here, and only in the browser. */
const Screen = dynamic(() => import('./sheet-screen').then((module) => module.SheetScreen), { ssr: false })

export function SheetScreen(props: SheetScreenProps) {
  return (
    <div className="flex h-dvh flex-col">
      <Screen {...props} />
      <noscript>
        <TopBar title={props.title} />
        <p className="p-6">This page needs JavaScript: the sheet is worked out in your browser.</p>
      </noscript>
    </div>
  )
}
