import { spawnSync } from 'node:child_process'
import { existsSync } from 'node:fs'

const names = ['chromium', 'chromium-browser', 'google-chrome']
const install = 'apt-get update && apt-get install -y --no-install-recommends chromium'

/** Path of a Chromium for the browser tests; installs Debian's where it may; null, said loudly, where there is none. */
export function findChromium(): string | null {
  const present = installedChromium()
  if (present !== null) return present
  if (process.getuid?.() === 0 && existsSync('/etc/debian_version')) {
    console.error(`Chromium is missing, installing it: ${install}`)
    const environment = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' }
    spawnSync('sh', ['-c', `${install} >&2`], { stdio: ['ignore', 'ignore', 'inherit'], env: environment })
  }
  const found = installedChromium()
  if (found === null) console.error(`*** BROWSER TESTS SKIPPED: no Chromium here. Install it with: ${install}`)
  return found
}

function installedChromium(): string | null {
  const folders = (process.env.PATH ?? '').split(':')
  const paths = names.flatMap((name) => folders.map((folder) => `${folder}/${name}`))
  return paths.find((path) => existsSync(path)) ?? null
}
