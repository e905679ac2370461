import { readFileSync } from 'node:fs'
import { z } from 'zod'
import { evaluateFormulas } from '@/lib/sheet/engine/evaluate'
import { rigFileSchema } from '@/lib/sheet/file'

/*
 * npm run --silent evaluate -- 'FORMULA' ...      formulas as arguments
 * npm run --silent evaluate -- --json             { "rig": [...], "formulas": [...] } on standard input
 *
 * Prints a JSON array with one result a formula. Needs no running server.
 */

const requestSchema = z.strictObject({ rig: rigFileSchema.default([]), formulas: z.array(z.string()) })

function request(args: readonly string[]): z.output<typeof requestSchema> {
  if (args[0] !== '--json') return { rig: [], formulas: [...args] }
  return requestSchema.parse(JSON.parse(readFileSync(0, 'utf8')))
}

try {
  const { rig, formulas } = request(process.argv.slice(2))
  const results = evaluateFormulas(formulas, rig, process.env.HYPERFORMULA_LICENSE_KEY ?? 'gpl-v3')
  process.stdout.write(`${JSON.stringify(results)}\n`)
} catch (error) {
  if (!(error instanceof z.ZodError) && !(error instanceof SyntaxError)) throw error
  const reason = error instanceof z.ZodError ? z.prettifyError(error) : `standard input is not JSON: ${error.message}`
  process.stderr.write(`${reason}\n`)
  process.exitCode = 2
}
