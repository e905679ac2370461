'use client'

import { useSyncExternalStore } from 'react'

const QUERY = '(max-width: 767px)'

/** Whether the screen is a phone's: then the sheet is read, not worked in. */
export function useNarrow(): boolean {
  return useSyncExternalStore(
    (changed) => {
      const query = window.matchMedia(QUERY)
      query.addEventListener('change', changed)
      return () => query.removeEventListener('change', changed)
    },
    () => window.matchMedia(QUERY).matches,
    () => false,
  )
}
