import { availableParallelism } from 'node:os'
import { doPartWork, type PartSteps, type PartWork } from '../study/part-work.ts'
import { breathe, type Session } from './session.ts'
import { openPool, type WorkerPool } from './worker-pool.ts'

/** Threads take some 50 ms to start: less work than this is done here. [s] */
const leastForThreads = 0.25
/** Rough cost of one solution of a dc and of a mains stage, only to choose by. [s] */
const secondsPerSolution = { dc: 6e-6, mains: 60e-6 } as const
/** The same of a first look at a part. [s] */
const secondsPerLook = 80e-6
/** More would wait for memory, not compute. */
const mostThreads = 8
/** Pieces per thread, so that none waits long for the last one. */
const piecesPerThread = 4
/** Parts of a first look in one piece: few enough to be sent quickly and to let a Ctrl-C through between them. */
const partsAtOnce = 2000

/**
 * Goes through the steps of a study: much work is shared among threads, little is done here. The result is the same to
 * the byte whatever the number of threads, because the answers about a part depend on that part alone.
 */
export async function doSteps<Result>(
  steps: PartSteps<Result>,
  session: Session,
  threads = Math.min(availableParallelism(), mostThreads),
): Promise<Result> {
  let pool: WorkerPool | null = null
  try {
    let step = steps.next()
    while (step.done !== true) {
      const work = step.value
      const pieces = cut(work, threads)
      const progress = progressOf(work, session)
      if (pieces.length > 1 && worthThreads(work)) {
        pool ??= openPool(new URL('dist/worker.js', session.root), threads)
        step = steps.next((await pool.doPieces(pieces, progress)).flat() as ReturnType<typeof doPartWork>)
      } else step = steps.next(await doHere(pieces, progress))
    }
    return step.value
  } finally {
    pool?.close()
  }
}

/** Sending a record to a thread and reading it there costs a fifth of a first look at it (tests/bench/catalogue.ts). */
function worthThreads({ kind, stage, parts, draws }: PartWork): boolean {
  if (kind === 'screen') return parts.length * secondsPerLook > leastForThreads
  const solutions = kind === 'draw' ? draws : (stage.dutyProfile?.length ?? 0)
  const each = stage.kind === 'mains-boost' ? secondsPerSolution.mains : secondsPerSolution.dc
  return parts.length * solutions * each > leastForThreads
}

function cut(work: PartWork, threads: number): readonly PartWork[] {
  const shared = Math.ceil(work.parts.length / (threads * piecesPerThread))
  const size = work.kind === 'screen' ? partsAtOnce : Math.max(1, shared)
  const count = Math.ceil(work.parts.length / size)
  return Array.from({ length: count }, (_, index) => ({
    ...work,
    parts: work.parts.slice(index * size, (index + 1) * size),
  }))
}

async function doHere(pieces: readonly PartWork[], onDone: (piece: PartWork) => void) {
  const answers: ReturnType<typeof doPartWork>[number][] = []
  for (const piece of pieces) {
    for (const answer of doPartWork(piece)) answers.push(answer)
    onDone(piece)
    if (piece.parts.length >= partsAtOnce) await breathe()
  }
  return answers
}

const doing: Readonly<Record<PartWork['kind'], string>> = {
  screen: 'looking at',
  draw: 'drawing',
  profile: 'following the loads of',
}

function progressOf({ kind, parts }: PartWork, session: Session): (piece: PartWork) => void {
  let done = 0
  return (piece) => {
    done += piece.parts.length
    session.progress(`${doing[kind]} the parts: ${done} of ${parts.length}`)
  }
}
