import { z } from 'zod'

/** What a sheet or a project may be called, for the form and for the server. */
export const titleSchema = z
  .string()
  .transform((text) => text.replace(/\s+/g, ' ').trim())
  .pipe(z.string().min(1, 'A name is needed.').max(120, 'A name has at most 120 characters.'))
