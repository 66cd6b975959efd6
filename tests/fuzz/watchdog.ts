import { Worker } from 'node:worker_threads'

/** A case that never ends would hold its own thread for ever, so another one looks at the clock. */
const watcher = `
const { parentPort } = require('node:worker_threads')
const { writeSync } = require('node:fs')
let timer
parentPort.on('message', ({ folder, words }) => {
  clearTimeout(timer)
  if (folder === '') return
  timer = setTimeout(() => {
    writeSync(2, 'a case does not end; its files are kept in ' + folder + '\\n  ebbwatt ' + words + '\\n')
    process.kill(process.pid, 'SIGKILL')
  }, 90_000)
})`

let worker: Worker | null = null

/** Starts the watch over a case, only where `startWatch` was called before; an empty folder ends it. */
export function watchCase(folder: string, words: string): void {
  worker?.postMessage({ folder, words })
}

/** For the program, whose process may be ended; tests have the limit of their runner. */
export function startWatch(): void {
  worker = new Worker(watcher, { eval: true })
  worker.unref()
}
