import { z } from 'zod'

const flag = z
  .enum(['on', 'off', 'true', 'false', '1', '0'], 'must be on or off')
  .transform((word) => word === 'on' || word === 'true' || word === '1')

const portWords = 'must be a number from 0 to 65535'
const port = z.coerce.number(portWords).int(portWords).min(0, portWords).max(65535, portWords)

/** An empty variable is as good as none. */
const given = <T extends z.ZodType>(schema: T) => z.preprocess((value) => (value === '' ? undefined : value), schema)

const schema = z
  .object({
    NODE_ENV: given(z.enum(['development', 'production', 'test']).default('development')),
    HOST: given(z.string().optional()),
    PORT: given(port.default(3000)),
    LOG_LEVEL: given(z.enum(['trace', 'debug', 'info', 'warn', 'error', 'silent']).default('info')),
    CHARGEHAND_DATA: given(z.string().default('data')),
    CHARGEHAND_DEMO: given(flag.optional()),
    CHARGEHAND_BEHIND_PROXY: given(flag.default(false)),
    DATABASE_URL: given(
      z
        .undefined('is not supported yet: Chargehand keeps its data in the folder CHARGEHAND_DATA. Unset DATABASE_URL')
        .optional(),
    ),
    NEXTAUTH_SECRET: given(z.string().min(32, 'must have 32 characters or more').optional()),
    NEXTAUTH_URL: given(z.url({ protocol: /^https?$/, error: 'must be an http or https address' }).optional()),
    HYPERFORMULA_LICENSE_KEY: given(z.string().default('gpl-v3')),
    HANDSONTABLE_LICENSE_KEY: given(z.string().default('non-commercial-and-evaluation')),
  })
  .transform((variables) => ({
    production: variables.NODE_ENV === 'production',
    host: variables.HOST,
    port: variables.PORT,
    logLevel: variables.LOG_LEVEL,
    /** The folder of the embedded database and of the secrets made at first start. */
    dataFolder: variables.CHARGEHAND_DATA,
    /** On unless it is turned off, or a database server holds real data. */
    demo: variables.CHARGEHAND_DEMO ?? variables.DATABASE_URL === undefined,
    /** True where a proxy in front sets the X-Forwarded headers; otherwise they are a caller's invention. */
    behindProxy: variables.CHARGEHAND_BEHIND_PROXY,
    authSecret: variables.NEXTAUTH_SECRET,
    /** The address people use, where it is known. */
    publicUrl: variables.NEXTAUTH_URL,
    hyperformulaLicenseKey: variables.HYPERFORMULA_LICENSE_KEY,
    handsontableLicenseKey: variables.HANDSONTABLE_LICENSE_KEY,
  }))

export type Environment = z.output<typeof schema>

/** Reads the environment; throws an Error with one sentence a wrong variable. */
export function readEnvironment(variables: Readonly<Record<string, string | undefined>>): Environment {
  const read = schema.safeParse(variables)
  if (read.success) return read.data
  const sentences = read.error.issues.map((issue) => `${issue.path.join('.')} ${issue.message}.`)
  throw new Error(sentences.join('\n'))
}

let current: Environment | undefined

/** The environment of this process, read once. */
export function environment(): Environment {
  return (current ??= readEnvironment(process.env))
}
