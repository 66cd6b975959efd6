import { Worker } from 'node:worker_threads'
import type { PartWork } from '../study/part-work.ts'

/** What a study's work on some parts gives, in their order. */
type Answers = readonly unknown[]

/** Threads that share pieces of work. Which thread does which piece changes nothing in the answers. */
export interface WorkerPool {
  /** `onDone` hears of every piece that is finished, in any order. */
  readonly doPieces: (pieces: readonly PartWork[], onDone: (piece: PartWork) => void) => Promise<readonly Answers[]>
  readonly close: () => void
}

/** Starts so many threads. */
export function openPool(program: URL, count: number): WorkerPool {
  const workers = Array.from({ length: count }, () => new Worker(program))
  return {
    async doPieces(pieces, onDone) {
      const answers = new Array<Answers>(pieces.length)
      const waiting = [...pieces.entries()]
      // Each thread takes the next piece when it has done one, so that none is idle while another has much to do.
      const run = async (worker: Worker): Promise<void> => {
        for (let next = waiting.shift(); next !== undefined; next = waiting.shift()) {
          const [index, piece] = next
          answers[index] = await ask(worker, piece)
          onDone(piece)
        }
      }
      await Promise.all(workers.map(run))
      return answers
    },
    close: () => {
      for (const worker of workers) void worker.terminate()
    },
  }
}

function ask(worker: Worker, piece: PartWork): Promise<Answers> {
  return new Promise((resolve, reject) => {
    const settle = (act: () => void): void => {
      worker.off('message', answered).off('error', failed).off('exit', ended)
      act()
    }
    const answered = (answers: Answers): void => settle(() => resolve(answers))
    const failed = (error: unknown): void => settle(() => reject(error))
    const ended = (code: number): void => settle(() => reject(new Error(`a worker thread ended with ${code}`)))
    worker.on('message', answered).on('error', failed).on('exit', ended)
    worker.postMessage(piece)
  })
}
