import { NextResponse } from 'next/server'
import { database } from '@/db/client'
import { ping } from '@/db/queries/health'

export const dynamic = 'force-dynamic'

/** 200 while pages are served and the database answers. */
export async function GET(): Promise<NextResponse> {
  await ping(database())
  return NextResponse.json({ status: 'ok' })
}
