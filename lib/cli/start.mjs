import process from 'node:process'
import { ensureBuilt } from './build.mjs'
import { ensureInstalled, needNode } from './install.mjs'
import { ROOT } from './root.mjs'

/*
 * npm start: installs what is missing, builds what has changed, serves. npm run dev: the same, with hot reload in place
 * of a build. Plain JavaScript, since it runs before any package is there.
 */
const dev = process.argv.includes('--dev')

needNode()
ensureInstalled()
process.chdir(ROOT)
process.env.NODE_ENV = dev ? 'development' : 'production'
process.env.NEXT_TELEMETRY_DISABLED = '1'
if (!dev && !ensureBuilt()) {
  console.error('The build failed: see above.')
  process.exit(1)
}
const { register } = await import('tsx/esm/api')
register()
const { main } = await import('../../realtime/main.ts')
await main()
