/** A thread that does pieces of a study's work: plain data in, plain data out, in the order asked. */
import { parentPort } from 'node:worker_threads'
import { doPartWork, type PartWork } from './study/part-work.ts'

parentPort?.on('message', (work: PartWork) => parentPort?.postMessage(doPartWork(work)))
