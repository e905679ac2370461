import { randomBytes } from 'node:crypto'
import { mkdir, readFile, writeFile } from 'node:fs/promises'
import path from 'node:path'
import { z } from 'zod'

const secretsSchema = z.object({ nextauthSecret: z.string().min(32) })

/**
 * The secret that signs sessions, made at first start and kept beside the data, readable by its owner alone. Throws
 * where the file is there and cannot be used: making another would sign everyone out without a word.
 */
export async function keptSecret(dataFolder: string): Promise<string> {
  const file = path.join(dataFolder, 'secrets.json')
  await mkdir(dataFolder, { recursive: true, mode: 0o700 })
  const made = { nextauthSecret: randomBytes(32).toString('base64url') }
  try {
    // wx: two starts at once agree on the one that came first.
    await writeFile(file, JSON.stringify(made, null, 2) + '\n', { mode: 0o600, flag: 'wx' })
    return made.nextauthSecret
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw error
  }
  try {
    return secretsSchema.parse(JSON.parse(await readFile(file, 'utf8'))).nextauthSecret
  } catch {
    throw new Error(`${file} cannot be read as secrets. Restore it, or remove it to make new ones (all sign in again).`)
  }
}
