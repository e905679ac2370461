import { mkdtemp, readFile, rm, stat, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { keptSecret } from '@/lib/auth/server/secret'

let folder: string
beforeEach(async () => (folder = await mkdtemp(path.join(tmpdir(), 'secret-'))))
afterEach(() => rm(folder, { recursive: true }))

describe('the secret beside the data', () => {
  it('is made once, for its owner alone', async () => {
    const made = await Promise.all([keptSecret(folder), keptSecret(folder)])
    expect(made[0]).toBe(made[1])
    expect(made[0]!.length).toBeGreaterThanOrEqual(43)
    expect(await keptSecret(folder)).toBe(made[0])
    expect((await stat(path.join(folder, 'secrets.json'))).mode & 0o777).toBe(0o600)
  })

  it('differs from folder to folder', async () => {
    expect(await keptSecret(path.join(folder, 'one'))).not.toBe(await keptSecret(path.join(folder, 'two')))
  })

  it('is not made anew over a file that cannot be read', async () => {
    const file = path.join(folder, 'secrets.json')
    await writeFile(file, '{')
    await expect(keptSecret(folder)).rejects.toThrow(`${file} cannot be read`)
    expect(await readFile(file, 'utf8')).toBe('{')
  })
})
