/**
 * Everything that the command line does once it knows what is wanted. It is built as one file with its compiled code
 * beside it (load-program.ts), which starts in half the time of many small files.
 */
export { runCheck } from './commands/check.ts'
export { outcomeOf, outcomeOfStream } from './commands/outcome.ts'
export { runRank } from './commands/rank.ts'
export { runReduce } from './commands/reduce.ts'
export { runReview } from './commands/review.ts'
export { runStart } from './commands/start.ts'
export { runSwap } from './commands/swap.ts'
export { runTrend } from './commands/trend.ts'
export { usageFailure } from './commands/usage-failure.ts'
