import { fileURLToPath } from 'node:url'

/** The folder that holds package.json. */
export const ROOT = fileURLToPath(new URL('../..', import.meta.url))
